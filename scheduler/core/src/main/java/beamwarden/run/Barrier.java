package beamwarden.run;

import beamwarden.ledger.Entry;
import java.util.Optional;

/**
 * Voids grants that are stored and were not sent: what they were admitted under holds no longer.
 */
final class Barrier {
  private Barrier() {}

  /** Before what holds for a sample changes. */
  static void declare(Turn turn, Entry.SampleDeclared declared) {
    String because = "what holds for its sample changed";
    if (turn.next.filter(slot -> isOf(slot, declared)).isPresent()) {
      turn.next.ifPresent(slot -> turn.write(neverSent(slot, because)));
      turn.next = Optional.empty();
    }
    if (turn.current.filter(slot -> isOf(slot, declared) && !slot.sentOut()).isPresent()) {
      turn.current.ifPresent(slot -> turn.write(neverSent(slot, because)));
      turn.current = Optional.empty();
    }
    turn.write(declared);
  }

  private static boolean isOf(Slot slot, Entry.SampleDeclared declared) {
    return slot.opened().chain().equals(declared.sample().id());
  }

  /** The entry that says that a stored grant was never sent. */
  static Entry neverSent(Slot slot, String because) {
    return new Entry.GrantVoided(
        slot.grant(), slot.opened().chain(), false, "it was never sent: " + because);
  }
}
