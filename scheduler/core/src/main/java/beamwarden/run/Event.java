package beamwarden.run;

import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.StopWhen;
import beamwarden.ledger.Recorded;
import beamwarden.queue.Queue;
import java.util.List;

/** What moves a run on. */
public sealed interface Event {
  /** Time has passed; something may be due. */
  record Woken() implements Event {}

  /**
   * What the last {@link Command.Commit} wanted to store is stored.
   *
   * @param recorded the entries as they now stand
   */
  record Committed(List<Recorded> recorded) implements Event {
    /** Copies the list. */
    public Committed {
      recorded = List.copyOf(recorded);
    }
  }

  /**
   * What the last commit wanted to store was not stored, or it is not known.
   *
   * @param reason why, in one sentence
   */
  record CommitFailed(String reason) implements Event {}

  /**
   * The fence was raised, durably.
   *
   * @param fence the new fencing number
   */
  record FenceRaised(long fence) implements Event {}

  /**
   * The instrument told something.
   *
   * @param event what it told
   */
  record FromInstrument(InstrumentEvent event) implements Event {}

  /**
   * A person asks for something.
   *
   * @param number the asking's number, named in the answer
   * @param wish what is asked
   */
  record Asked(long number, Wish wish) implements Event {}

  /** What a person can ask of a run. */
  sealed interface Wish {
    /**
     * Take this queue in.
     *
     * @param queue the queue, already checked
     * @param profileHash the hash of the profile against which it was checked
     */
    record Submit(Queue queue, String profileHash) implements Wish {}

    /**
     * Hold jobs; a running one ends at its next boundary.
     *
     * @param jobs the jobs' ids
     */
    record Hold(List<String> jobs) implements Wish {}

    /**
     * Let held jobs go on, and a stopped night too when {@code night} says so.
     *
     * @param jobs the jobs' ids
     * @param night whether a stopped night goes on
     */
    record Release(List<String> jobs, boolean night) implements Wish {}

    /**
     * Take jobs back for good.
     *
     * @param jobs the jobs' ids
     */
    record Withdraw(List<String> jobs) implements Wish {}

    /**
     * Stop the night until it is released.
     *
     * @param when how soon the running exposure ends
     */
    record Stop(StopWhen when) implements Wish {}

    /**
     * Loosen something, or confirm what only a person can see.
     *
     * @param thing a job's id, a sample's id, {@code placements} or {@code hand-over}
     * @param reason why
     */
    record Approve(String thing, String reason) implements Wish {}
  }
}
