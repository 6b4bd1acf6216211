package beamwarden.plan;

import beamwarden.dose.CapVerdict;
import beamwarden.dose.Exposures;
import beamwarden.dose.JobDose;
import beamwarden.dose.Trim;
import beamwarden.instrument.Abilities;
import beamwarden.ledger.Books;
import beamwarden.ledger.Entry;
import beamwarden.ledger.JobRecord;
import beamwarden.ledger.SampleRecord;
import beamwarden.queue.AtCap;
import beamwarden.queue.HeldFor;
import beamwarden.queue.JobState;
import java.time.Instant;
import java.util.Optional;

/**
 * Which change of a job's state follows from the books alone: the same for the walk and the run.
 *
 * <pre>
 * waiting → refused    a cap leaves no room for it (at-cap refuse), or for any part of it (trim)
 * waiting → held       a cap leaves no room (at-cap ask); a job before it ended undone
 * waiting → failed     its deadline passed
 * running → done       nothing is left of it
 * running → shortened  nothing is left of what it was cut to; its deadline passed; a cap ended it
 *                      early under trim
 * running → refused    a cap ended it early under refuse
 * running → held       a cap ended it early under ask
 * </pre>
 */
public final class Settling {
  private final Abilities abilities;

  /** The rules for jobs on an instrument. */
  public Settling(Abilities abilities) {
    this.abilities = abilities;
  }

  /** The change that is due before a job may be exposed, if one is. */
  public Optional<Entry> due(Books books, JobRecord record, Instant now) {
    SampleRecord sample = books.sample(record.job().sample()).orElseThrow();
    if (nothingLeft(record, sample)) {
      return Optional.of(
          record.trim().isPresent()
              ? changed(record, JobState.SHORTENED, "cut to what fits: " + record.trimmedBecause())
              : changed(record, JobState.DONE, ""));
    }
    if (record.job().deadline().filter(now::isAfter).isPresent()) {
      JobState end = record.started().isPresent() ? JobState.SHORTENED : JobState.FAILED;
      return Optional.of(changed(record, end, "its deadline passed"));
    }
    return behind(books, record)
        .or(() -> mayRun(books, record, now) ? judged(record, sample) : Optional.empty());
  }

  /** Whether its time has come, and its predecessors are done or a person let it go on. */
  public boolean mayRun(Books books, JobRecord record, Instant now) {
    boolean timely = record.job().earliest().filter(now::isBefore).isEmpty();
    return timely
        && (record.letGoOn()
            || record.job().after().stream()
                .allMatch(id -> books.job(id).filter(one -> one.state().satisfies()).isPresent()));
  }

  private boolean nothingLeft(JobRecord record, SampleRecord sample) {
    return Exposures.next(
            record.job(), sample.sample(), abilities, record.effectiveDone(), record.trim())
        .isEmpty();
  }

  private static Optional<Entry> behind(Books books, JobRecord record) {
    if (record.letGoOn()) {
      return Optional.empty();
    }
    return record.job().after().stream()
        .flatMap(id -> books.job(id).stream())
        .filter(before -> before.state().ended() && !before.state().satisfies())
        .findFirst()
        .map(
            before ->
                held(
                    record,
                    HeldFor.PREDECESSOR,
                    before.job().id()
                        + ", which must come before it, is "
                        + before.state().text()));
  }

  /** Before its first grant a job is judged as a whole, so that none begins that cannot end. */
  private Optional<Entry> judged(JobRecord record, SampleRecord sample) {
    if (record.started().isPresent() || record.trim().isPresent()) {
      return Optional.empty();
    }
    JobDose whole =
        JobDose.of(
            record.job(), sample.sample(), abilities, sample.dose(), record.done(), record.trim());
    return whole.verdict() instanceof CapVerdict.Refused refused
        ? Optional.of(cut(record, sample, refused))
        : Optional.empty();
  }

  private Entry cut(JobRecord record, SampleRecord sample, CapVerdict.Refused refused) {
    if (record.job().atCap() != AtCap.TRIM) {
      return atCap(record, refused);
    }
    Optional<Trim> trim =
        JobDose.trim(
            record.job(),
            sample.sample(),
            sample.dose(),
            abilities,
            record.job().beam().current(),
            record.done());
    return trim.isPresent()
        ? new Entry.JobTrimmed(record.job().id(), trim.get(), refused.because())
        : changed(record, JobState.REFUSED, "not even a line of it fits: " + refused.because());
  }

  /** What a job wants when a cap does not let it go on. */
  public static Entry atCap(JobRecord record, CapVerdict.Refused refused) {
    return switch (record.job().atCap()) {
      case REFUSE -> changed(record, JobState.REFUSED, refused.because());
      case ASK -> held(record, HeldFor.APPROVAL, refused.because());
      case TRIM ->
          changed(
              record,
              record.exposures() > 0 ? JobState.SHORTENED : JobState.REFUSED,
              refused.because());
    };
  }

  /** A job is held. */
  public static Entry held(JobRecord record, HeldFor what, String because) {
    return new Entry.JobChanged(record.job().id(), JobState.HELD, Optional.of(what), because);
  }

  /** A job moves to another state than held. */
  public static Entry changed(JobRecord record, JobState state, String because) {
    return new Entry.JobChanged(record.job().id(), state, Optional.empty(), because);
  }
}
