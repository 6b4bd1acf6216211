package beamwarden.simulated;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.Point;
import beamwarden.beam.Scan;
import beamwarden.beam.SpotScan;
import java.time.Duration;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;

/** What the hardware remembers is read back to the last bit. */
class HardwareStateTest {
  @Test
  void remembersEverything() {
    HardwareState state = new HardwareState(Session.EVENING);
    state.session = 3;
    state.conditions = Optional.of(Lab.VIOLET);
    state.stage = new Point(0.1 / 3, -1e-9);
    state.moves = 17;
    state.settings = 5;
    state.valveClosed = false;
    state.doorOpenUntil = Session.EVENING.plusNanos(1);
    state.trippedUntil = Session.EVENING.plusNanos(2);
    state.surgeFrom = Session.EVENING.plusNanos(3);
    state.surgeUntil = Session.EVENING.plusNanos(4);
    state.surgeFactor = 1.7;
    state.exposed = 12;
    state.run = Optional.of(run(Session.raster(17)));
    assertReadBack(state);
    state.run = Optional.of(run(new SpotScan(new Point(1e-6, 2e-6), Duration.ofNanos(77))));
    assertReadBack(state);
    state.conditions = Optional.empty();
    state.run = Optional.empty();
    assertReadBack(state);
  }

  @Test
  void remembersNothingOfWhatCannotBeRead() {
    assertTrue(HardwareState.remembered(List.of()).isEmpty());
    assertTrue(HardwareState.remembered(List.of("torn off")).isEmpty());
  }

  private static void assertReadBack(HardwareState state) {
    HardwareState read = HardwareState.remembered(List.of(state.line())).orElseThrow();
    assertEquals(state.line(), read.line());
    assertEquals(state.run, read.run);
    assertEquals(state.settings, read.settings);
    assertEquals(state.moves, read.moves);
    assertEquals(state.exposed, read.exposed);
  }

  private static Run run(Scan scan) {
    return new Run(9, 4, "sst-07", Session.PLACEMENT, scan, 123_456, Session.EVENING);
  }
}
