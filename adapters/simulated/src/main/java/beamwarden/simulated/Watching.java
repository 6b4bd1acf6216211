package beamwarden.simulated;

import beamwarden.instrument.Fault;
import beamwarden.instrument.InstrumentEvent;
import java.util.Optional;

/** Passes on to the adapter what the hardware tells. */
record Watching(Desk desk) implements Watcher {
  @Override
  public void scanOver(Outcome outcome) {
    desk.guarded(() -> desk.running().ifPresent(running -> running.scanOver(outcome)));
  }

  @Override
  public void beamLost(Fault fault, Optional<Outcome> cut) {
    desk.guarded(
        () -> {
          Optional<Exposing> running = desk.running();
          if (running.isPresent() && cut.isPresent()) {
            running.get().beamLost(fault, cut.get());
          } else {
            desk.say(new InstrumentEvent.Trouble(fault));
          }
        });
  }

  @Override
  public void surged() {
    desk.guarded(() -> desk.running().ifPresent(Exposing::watchCurrent));
  }

  @Override
  public void replaced() {
    desk.end();
  }
}
