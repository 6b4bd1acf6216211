package beamwarden.run;

import beamwarden.dose.CapVerdict;
import beamwarden.instrument.Fault;
import beamwarden.ledger.Entry;
import beamwarden.ledger.JobRecord;
import beamwarden.plan.Settling;
import beamwarden.queue.HeldFor;
import beamwarden.queue.JobState;
import java.util.Optional;

/**
 * When a job changes its state in a run.
 *
 * <p>{@link Settling} lists what follows from the books alone. Beyond that:
 *
 * <pre>
 * waiting → running    its first grant is stored
 * running → waiting    the shift closed
 * running → failed     a fault came more often than the profile's retries, or cannot be mended
 * any     → held       the chamber was touched
 * </pre>
 *
 * <p>People hold, release, withdraw and approve: see {@link WishSteps}.
 */
final class JobSteps {
  private final RunSetup setup;
  private final Settling settling;

  JobSteps(RunSetup setup) {
    this.setup = setup;
    this.settling = new Settling(setup.profile().abilities());
  }

  /** Writes a change of state that is due before the job may be exposed; true when it did. */
  boolean settle(Turn turn, JobRecord record) {
    Optional<Entry> due = settling.due(turn.books, record, turn.now);
    due.ifPresent(turn::write);
    return due.isPresent();
  }

  /** Whether its predecessors are done and its time has come. */
  boolean mayRun(Turn turn, JobRecord record) {
    return settling.mayRun(turn.books, record, turn.now);
  }

  /** What a job wants when a cap does not let it go on. */
  static void stopAtCap(Turn turn, JobRecord record, CapVerdict.Refused refused) {
    turn.write(Settling.atCap(record, refused));
  }

  /** A fault while the instrument was brought to a job's conditions. */
  void faulted(Turn turn, String job, Fault fault) {
    Booking.fault(turn, setup.profile(), job, fault);
    turn.write(new Entry.JobFaulted(job));
  }

  static void hold(Turn turn, JobRecord record, HeldFor what, String because) {
    turn.write(Settling.held(record, what, because));
  }

  /** Lets a held job go on; while a chamber session waits to be confirmed, it waits for that. */
  static void goOn(Turn turn, JobRecord record, String because) {
    if (turn.books.unconfirmedSession().isPresent()) {
      turn.write(LinkSteps.holdForPlacements(record.job().id()));
    } else {
      change(turn, record, JobState.WAITING, because);
    }
  }

  static void change(Turn turn, JobRecord record, JobState state, String because) {
    turn.write(Settling.changed(record, state, because));
  }
}
