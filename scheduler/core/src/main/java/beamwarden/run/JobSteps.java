package beamwarden.run;

import beamwarden.dose.CapVerdict;
import beamwarden.dose.JobDose;
import beamwarden.dose.Trim;
import beamwarden.instrument.Fault;
import beamwarden.ledger.Entry;
import beamwarden.ledger.JobRecord;
import beamwarden.ledger.SampleRecord;
import beamwarden.queue.AtCap;
import beamwarden.queue.HeldFor;
import beamwarden.queue.JobState;
import java.util.Optional;

/**
 * When a job changes its state by itself.
 *
 * <pre>
 * waiting → running    its first grant is stored
 * waiting → refused    a cap leaves no room for it (at-cap refuse), or for any part of it (trim)
 * waiting → held       a cap leaves no room (at-cap ask); a job before it ended undone; the chamber
 *                      was touched
 * running → done       nothing is left of it
 * running → shortened  nothing is left of what it was cut to; its deadline passed; a cap ended it
 *                      early under trim
 * running → refused    a cap ended it early under refuse
 * running → held       a cap ended it early under ask; the chamber was touched
 * running → failed     a fault came more often than the profile's retries, or cannot be mended
 * </pre>
 *
 * <p>People hold, release, withdraw and approve: see {@link WishSteps}.
 */
final class JobSteps {
  private final RunSetup setup;

  JobSteps(RunSetup setup) {
    this.setup = setup;
  }

  /** Writes a change of state that is due before the job may be exposed; true when it did. */
  boolean settle(Turn turn, JobRecord record, boolean nothingLeft) {
    SampleRecord sample = turn.books.sample(record.job().sample()).orElseThrow();
    if (nothingLeft) {
      JobState end = record.trim().isPresent() ? JobState.SHORTENED : JobState.DONE;
      change(turn, record, end, record.trim().isPresent() ? "cut to what its caps allow" : "");
      return true;
    }
    if (record.job().deadline().filter(turn.now::isAfter).isPresent()) {
      boolean part = record.started().isPresent();
      change(turn, record, part ? JobState.SHORTENED : JobState.FAILED, "its deadline passed");
      return true;
    }
    return holdBehind(turn, record) || (mayRun(turn, record) && judge(turn, record, sample));
  }

  /** Whether its predecessors are done and its time has come. */
  boolean mayRun(Turn turn, JobRecord record) {
    boolean timely = record.job().earliest().filter(turn.now::isBefore).isEmpty();
    return timely
        && record.job().after().stream()
            .allMatch(
                before ->
                    turn.books.job(before).filter(one -> one.state().satisfies()).isPresent());
  }

  private boolean holdBehind(Turn turn, JobRecord record) {
    for (String id : record.job().after()) {
      Optional<JobRecord> before = turn.books.job(id);
      if (before.isPresent() && before.get().state().ended() && !before.get().state().satisfies()) {
        hold(
            turn,
            record,
            HeldFor.PREDECESSOR,
            id + ", which must come before it, is " + before.get().state().text());
        return true;
      }
    }
    return false;
  }

  /** Before its first grant a job is judged as a whole, so that none begins that cannot end. */
  private boolean judge(Turn turn, JobRecord record, SampleRecord sample) {
    if (record.started().isPresent() || record.trim().isPresent()) {
      return false;
    }
    JobDose whole =
        JobDose.of(
            record.job(),
            sample.sample(),
            setup.profile().abilities(),
            sample.dose(),
            record.done(),
            record.trim());
    if (whole.verdict() instanceof CapVerdict.Refused refused) {
      refuseOrTrim(turn, record, sample, refused);
      return true;
    }
    return false;
  }

  private void refuseOrTrim(
      Turn turn, JobRecord record, SampleRecord sample, CapVerdict.Refused refused) {
    if (record.job().atCap() != AtCap.TRIM) {
      stopAtCap(turn, record, refused);
      return;
    }
    Optional<Trim> trim =
        JobDose.trim(
            record.job(),
            sample.sample(),
            sample.dose(),
            setup.profile().abilities(),
            record.job().beam().current(),
            record.done());
    if (trim.isPresent()) {
      turn.write(new Entry.JobTrimmed(record.job().id(), trim.get(), refused.because()));
    } else {
      change(turn, record, JobState.REFUSED, "not even a line of it fits: " + refused.because());
    }
  }

  /** What a job wants when a cap does not let it go on. */
  void stopAtCap(Turn turn, JobRecord record, CapVerdict.Refused refused) {
    switch (record.job().atCap()) {
      case REFUSE -> change(turn, record, JobState.REFUSED, refused.because());
      case ASK -> hold(turn, record, HeldFor.APPROVAL, refused.because());
      case TRIM -> {
        boolean part = record.exposures() > 0;
        change(turn, record, part ? JobState.SHORTENED : JobState.REFUSED, refused.because());
      }
    }
  }

  /** A fault while the instrument was brought to a job's conditions. */
  void faulted(Turn turn, String job, Fault fault) {
    Booking.fault(turn, setup.profile(), job, fault);
    turn.write(new Entry.JobFaulted(job));
  }

  static void hold(Turn turn, JobRecord record, HeldFor what, String because) {
    turn.write(new Entry.JobChanged(record.job().id(), JobState.HELD, Optional.of(what), because));
  }

  static void change(Turn turn, JobRecord record, JobState state, String because) {
    turn.write(new Entry.JobChanged(record.job().id(), state, Optional.empty(), because));
  }
}
