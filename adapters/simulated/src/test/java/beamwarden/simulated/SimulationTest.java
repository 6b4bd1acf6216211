package beamwarden.simulated;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Map;
import org.junit.jupiter.api.Test;

/** Options: what holds when nothing is said, and what is refused. */
class SimulationTest {
  @Test
  void saysWhatHoldsWithoutOptions() {
    Simulation usual = Simulation.of(Map.of());
    assertEquals(1, usual.seed());
    assertTrue(usual.noise() && usual.data() && usual.onDisk());
  }

  @Test
  void writesNoDataWhenNothingIsKeptOnDisk() {
    assertFalse(Simulation.of(Map.of("notes", "memory")).data());
    assertTrue(Simulation.of(Map.of("notes", "memory", "data", "on")).data());
  }

  @Test
  void refusesWhatItCannotRead() {
    assertRefused("the option seed must be a whole number, not 'x'", Map.of("seed", "x"));
    assertRefused("the option noise must be on or off, not 'loud'", Map.of("noise", "loud"));
    assertRefused("the option notes must be disk or memory, not 'paper'", Map.of("notes", "paper"));
  }

  private static void assertRefused(String message, Map<String, String> options) {
    assertEquals(
        message,
        assertThrows(IllegalArgumentException.class, () -> Simulation.of(options)).getMessage());
  }
}
