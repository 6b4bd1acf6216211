package beamwarden.physics;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;

class LatticeTest {
  /** Both sums are the same function: theta functions, DLMF 20.7.32. */
  @Test
  void bothSumsAgreeWhereTheySwap() {
    double crossing = 1 / Math.sqrt(2 * Math.PI);
    for (double factor : new double[] {0.9999999, 1, 1.0000001}) {
      assertEquals(byManySpots(crossing * factor), Lattice.highest(crossing * factor), 1e-14);
    }
  }

  @Test
  void agreesWithASumOverManySpots() {
    for (double s = 0.05; s < 2; s += 0.01) {
      assertEquals(1, Lattice.highest(s) / byManySpots(s), 1e-14, "at " + s);
    }
  }

  @Test
  void neverFallsBelowTheMeanAndNeverRisesWithTheWidth() {
    double before = Lattice.highest(0.01);
    for (double s = 0.02; s < 3; s += 0.01) {
      double highest = Lattice.highest(s);
      assertTrue(highest >= 1 && highest <= before, "at " + s);
      before = highest;
    }
  }

  @Test
  void isInfiniteForASpotWithoutWidth() {
    assertEquals(Double.POSITIVE_INFINITY, Lattice.highest(0));
  }

  @Test
  void refusesANegativeWidth() {
    assertThrows(IllegalArgumentException.class, () -> Lattice.highest(-0.1));
  }

  private static double byManySpots(double s) {
    double sum = 0;
    for (int m = -200; m <= 200; m++) {
      sum += Math.exp(-m * m / (2 * s * s));
    }
    return sum / (s * Math.sqrt(2 * Math.PI));
  }
}
