package beamwarden.simulated;

import beamwarden.instrument.Fault;
import java.util.Optional;

/** What the hardware tells whoever drives it; called under the hardware's lock. */
interface Watcher {
  /** Nobody drives it. */
  Watcher NOBODY =
      new Watcher() {
        @Override
        public void scanOver(Outcome outcome) {}

        @Override
        public void beamLost(Fault fault, Optional<Outcome> cut) {}

        @Override
        public void surged() {}

        @Override
        public void replaced() {}
      };

  /** The scan engine came to the scan's end, or to the end of its time. */
  void scanOver(Outcome outcome);

  /** Something turned the beam off; {@code cut} is what was done of a scan that ran. */
  void beamLost(Fault fault, Optional<Outcome> cut);

  /** The monitor sees the current jump. */
  void surged();

  /** Another adapter drives the hardware from now on: this one's process must be gone. */
  void replaced();
}
