package beamwarden.run;

import beamwarden.beam.Conditions;
import beamwarden.beam.Point;
import beamwarden.instrument.Grant;
import beamwarden.instrument.StopWhen;
import beamwarden.ledger.Entry;
import java.util.List;
import java.util.Optional;
import java.util.Set;

/**
 * What a step wants done, in order.
 *
 * <p>A {@link Commit} is always the last of a step; its outcome is the very next event. So nothing
 * that rests on an entry is ever sent before that entry is on disk.
 */
public sealed interface Command {
  /**
   * Store entries, all or none.
   *
   * @param entries at least one
   */
  record Commit(List<Entry> entries) implements Command {
    /** Copies the list. */
    public Commit {
      entries = List.copyOf(entries);
    }
  }

  /** Raise the instrument's fence in the store; the outcome is the very next event. */
  record RaiseFence() implements Command {}

  /** Connect to the instrument. */
  record Connect() implements Command {}

  /**
   * Seal the instrument.
   *
   * @param fence the new fence
   * @param grants the grants whose fate the books want to know
   * @param handOver whether a person approved taking it over from another store
   */
  record Seal(long fence, Set<Long> grants, boolean handOver) implements Command {
    /** Copies the set. */
    public Seal {
      grants = Set.copyOf(grants);
    }
  }

  /**
   * Bring the instrument to conditions.
   *
   * @param request the request's number
   * @param conditions the conditions
   * @param stage where the stage goes
   */
  record Prepare(long request, Conditions conditions, Point stage) implements Command {}

  /**
   * Measure the probe current.
   *
   * @param request the request's number
   */
  record Measure(long request) implements Command {}

  /**
   * Hand a stored grant to the instrument.
   *
   * @param grant the grant
   */
  record Begin(Grant grant) implements Command {}

  /**
   * End what is exposing.
   *
   * @param when how soon
   */
  record StopExposure(StopWhen when) implements Command {}

  /**
   * Renew the lease.
   *
   * @param number the heartbeat's number
   */
  record Heartbeat(long number) implements Command {}

  /**
   * Let the adapter forget a receipt that is booked.
   *
   * @param grant the grant's number
   */
  record Acknowledge(long grant) implements Command {}

  /** Blank, close the column valve, park. */
  record WindDown() implements Command {}

  /**
   * Answer a person.
   *
   * @param number the asking's number
   * @param refusal why not; empty when it was done and is on disk
   */
  record Answer(long number, Optional<String> refusal) implements Command {}

  /**
   * Stop everything: the books cannot be written, or a dose rule is broken.
   *
   * @param reason why, in one sentence
   */
  record Halt(String reason) implements Command {}
}
