package beamwarden.simulated;

import beamwarden.quantity.Current;
import java.util.SplittableRandom;

/**
 * The current that truly flows: the wished one, a little less, wandering slowly.
 *
 * <p>Any two of its values differ by less than the drift that the meter guarantees, because it
 * stays within a quarter of the drift to either side of its middle: a sum of slow waves, invented,
 * whose integral is exact. From a surge on it is multiplied. Times are seconds since the hardware
 * was opened.
 */
final class TrueCurrent {
  private static final int WAVES = 3;
  private static final double LARGEST_OFFSET = 0.02;
  private static final double SHORTEST_PERIOD_SECONDS = 3 * 3600;
  private static final double LONGEST_PERIOD_SECONDS = 12 * 3600;

  private final double middle;
  private final double swing;
  private final double[] rates = new double[WAVES];
  private final double[] phases = new double[WAVES];
  private final Surge surge;

  /**
   * A factor on the current.
   *
   * @param fromSeconds from when on
   * @param factor by how much, above zero
   */
  record Surge(double fromSeconds, double factor) {
    /** None. */
    static final Surge NONE = new Surge(Double.POSITIVE_INFINITY, 1);
  }

  /** A wandering current; of a drift of zero exactly the wished one, always. */
  TrueCurrent(Current wished, double drift, SplittableRandom random, Surge surge) {
    double offset = Math.min(LARGEST_OFFSET, drift / 2) * random.nextDouble();
    this.middle = wished.amperes() * (1 - offset);
    this.swing = drift / 4 / WAVES;
    for (int wave = 0; wave < WAVES; wave++) {
      double period =
          SHORTEST_PERIOD_SECONDS
              + random.nextDouble() * (LONGEST_PERIOD_SECONDS - SHORTEST_PERIOD_SECONDS);
      rates[wave] = 2 * Math.PI / period;
      phases[wave] = 2 * Math.PI * random.nextDouble();
    }
    this.surge = surge;
  }

  /** Whether it moves at all. */
  boolean wanders() {
    return swing > 0;
  }

  /** The current at a moment. */
  double amperes(double seconds) {
    return calm(seconds) * factor(seconds);
  }

  /** The mean over a stretch that does not hold the beginning of a surge inside. */
  double mean(double from, double to) {
    if (swing == 0 || to <= from) {
      return amperes(from);
    }
    double sum = 0;
    for (int wave = 0; wave < WAVES; wave++) {
      sum +=
          (Math.cos(rates[wave] * from + phases[wave]) - Math.cos(rates[wave] * to + phases[wave]))
              / rates[wave];
    }
    return middle * (1 + swing * sum / (to - from)) * factor(from);
  }

  /** How far the current can move within a time, a surge apart. */
  double moves(double seconds) {
    double rate = 0;
    for (double one : rates) {
      rate += one;
    }
    return middle * swing * rate * seconds * Math.max(1, surge.factor);
  }

  private double calm(double seconds) {
    if (swing == 0) {
      return middle;
    }
    double sum = 0;
    for (int wave = 0; wave < WAVES; wave++) {
      sum += Math.sin(rates[wave] * seconds + phases[wave]);
    }
    return middle * (1 + swing * sum);
  }

  private double factor(double seconds) {
    return seconds >= surge.fromSeconds ? surge.factor : 1;
  }
}
