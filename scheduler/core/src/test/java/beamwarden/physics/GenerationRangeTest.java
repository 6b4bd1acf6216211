package beamwarden.physics;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import beamwarden.quantity.Voltage;
import org.junit.jupiter.api.Test;

class GenerationRangeTest {
  @Test
  void fallsAsTheDensityRises() {
    double loose = new GenerationRange(Formula.parse("SiO2"), 1).at(new Voltage(5000)).metres();
    double dense = new GenerationRange(Formula.parse("SiO2"), 4).at(new Voltage(5000)).metres();
    assertEquals(4, loose / dense, 1e-12);
  }

  @Test
  void refusesADensityOfZero() {
    assertEquals(
        "a density must be above zero, not 0.0 g/cm3",
        assertThrows(
                IllegalArgumentException.class, () -> new GenerationRange(Formula.parse("Si"), 0))
            .getMessage());
  }
}
