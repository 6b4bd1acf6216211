package beamwarden.run;

import beamwarden.instrument.StopWhen;
import beamwarden.ledger.Entry.GrantOpened;
import java.time.Instant;
import java.util.Optional;

/**
 * A grant on its way.
 *
 * @param opened the entry with which it was stored
 * @param phase how far it is
 * @param chainHead the head of its sample's chain with that entry; empty before it is stored
 * @param sent when it was sent; the far future before
 * @param due when its receipt is overdue; the far future before it is sent
 * @param unitsDone units done so far, as the instrument last said
 * @param stopAsked how soon its exposure was asked to end early, if it was
 * @param lookedAhead whether it was seen to that the next grant is stored while it runs
 */
record Slot(
    GrantOpened opened,
    Phase phase,
    String chainHead,
    Instant sent,
    Instant due,
    long unitsDone,
    Optional<StopWhen> stopAsked,
    boolean lookedAhead) {
  /** How far a grant is. */
  enum Phase {
    /** Its entry is being stored. */
    STORING,
    /** Its entry is on disk; it was not sent. */
    STORED,
    /** It was sent. */
    SENT,
    /** The instrument said that it has begun. */
    EXPOSING
  }

  static Slot storing(GrantOpened opened) {
    return new Slot(
        opened, Phase.STORING, "", Instant.MAX, Instant.MAX, 0, Optional.empty(), false);
  }

  Slot stored(String head) {
    return new Slot(opened, Phase.STORED, head, sent, due, 0, stopAsked, lookedAhead);
  }

  Slot sentAt(Instant now, Instant overdue) {
    return new Slot(opened, Phase.SENT, chainHead, now, overdue, 0, stopAsked, lookedAhead);
  }

  Slot exposing(long units) {
    return new Slot(opened, Phase.EXPOSING, chainHead, sent, due, units, stopAsked, lookedAhead);
  }

  Slot asStopping(StopWhen when) {
    return new Slot(opened, phase, chainHead, sent, due, unitsDone, Optional.of(when), lookedAhead);
  }

  Slot asLookedAhead() {
    return new Slot(opened, phase, chainHead, sent, due, unitsDone, stopAsked, true);
  }

  boolean stopping() {
    return stopAsked.isPresent();
  }

  /** Whether it was asked to end that soon already, or sooner. */
  boolean stopping(StopWhen when) {
    return stopAsked.filter(asked -> asked == StopWhen.NOW || asked == when).isPresent();
  }

  long grant() {
    return opened.grant();
  }

  boolean sentOut() {
    return phase == Phase.SENT || phase == Phase.EXPOSING;
  }
}
