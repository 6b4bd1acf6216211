package beamwarden.simulated;

import beamwarden.instrument.GrantFate;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.SealReport;
import java.util.HashMap;
import java.util.Map;
import java.util.Set;

/**
 * One seal.
 *
 * <p>The order of steps: refuse, or raise the fence durably; forbid what waits; blank; answer.
 *
 * @param fence the new fencing number
 * @param store who seals
 * @param asked the grants about which it wants to know
 * @param handOver whether a person approved that another store takes over
 */
record Sealing(long fence, String store, Set<Long> asked, boolean handOver) {
  /** Copies the numbers. */
  Sealing {
    asked = Set.copyOf(asked);
  }

  /** Seals. */
  void at(Desk desk, GrantRules rules) {
    Notes notes = desk.notes();
    if (isRefused(notes)) {
      desk.say(new InstrumentEvent.SealRefused(notes.fence(), notes.store()));
      return;
    }
    boolean provable = notes.knows(store);
    notes.seal(fence, store, asked);
    rules.sealed(true);
    desk.blank("the adapter was sealed before the grant began");
    desk.forgetRefusals();
    desk.strike(FaultPlan.Step.SEAL);
    if (!desk.hasEnded()) {
      desk.say(
          new InstrumentEvent.Sealed(
              new SealReport(fence, store, notes.lastBegun(), fates(notes, provable))));
    }
  }

  /** The same fence may come again from the same store, whose answer was lost. */
  private boolean isRefused(Notes notes) {
    boolean another = !notes.store().isEmpty() && !store.equals(notes.store());
    return fence < notes.fence() || (another && (!handOver || fence == notes.fence()));
  }

  /** A store that these notes have never seen may have sent grants to notes that were lost. */
  private Map<Long, GrantFate> fates(Notes notes, boolean provable) {
    Map<Long, GrantFate> fates = new HashMap<>();
    for (long grant : asked) {
      GrantFate unreported =
          provable && !notes.hasBegun(grant) ? new GrantFate.NeverBegun() : new GrantFate.Unknown();
      fates.put(
          grant, notes.kept(grant).<GrantFate>map(GrantFate.Reported::new).orElse(unreported));
    }
    return fates;
  }
}
