package beamwarden.simulated;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * Counts are Poisson: mean and variance are both the expected count (any textbook of statistics).
 * Bounds: five standard errors, sqrt(m/n) of the mean and about m·sqrt((2 + 1/m)/n) of the
 * variance.
 */
class CountingTest {
  private static final int DRAWS = 200_000;

  @ParameterizedTest
  @ValueSource(doubles = {0.01, 0.5, 3, 12, 29.9, 30, 120, 5e4})
  void hasItsMeanAndVariance(double mean) {
    SplittableRandom random = new SplittableRandom(20310312);
    double sum = 0;
    double squares = 0;
    for (int draw = 0; draw < DRAWS; draw++) {
      double off = Counting.poisson(mean, random) - mean;
      sum += off;
      squares += off * off;
    }
    double variance = squares / DRAWS - (sum / DRAWS) * (sum / DRAWS);
    assertEquals(0, sum / DRAWS, 5 * Math.sqrt(mean / DRAWS));
    // Rounding a normal draw adds 1/12 to the variance.
    assertEquals(mean, variance, 5 * mean * Math.sqrt((2 + 1 / mean) / DRAWS) + 1.0 / 12);
  }

  @Test
  void hasTheShareOfEmptyCountsThatItShould() {
    SplittableRandom random = new SplittableRandom(7);
    int empty = 0;
    for (int draw = 0; draw < DRAWS; draw++) {
      empty += Counting.poisson(1.5, random) == 0 ? 1 : 0;
    }
    // exp(-1.5) = 0.22313, five standard errors.
    assertEquals(0.22313, empty / (double) DRAWS, 5 * Math.sqrt(0.22313 * 0.77687 / DRAWS));
  }

  @Test
  void neverCountsBelowZero() {
    SplittableRandom random = new SplittableRandom(7);
    assertEquals(0, Counting.poisson(0, random));
    assertEquals(0, Counting.poisson(-1, random));
    for (int draw = 0; draw < DRAWS; draw++) {
      assertTrue(Counting.poisson(30, random) >= 0);
    }
  }
}
