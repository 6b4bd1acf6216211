package beamwarden.simulated;

import java.util.SplittableRandom;

/** Random counts of independent events: the Poisson distribution. */
final class Counting {
  /** From this mean on a normal distribution is near enough, and much faster. */
  static final double NORMAL_FROM = 30;

  /** Far beyond any count below {@link #NORMAL_FROM} that a random number can reach. */
  private static final int MOST_BELOW_NORMAL = 150;

  /** One over each whole number: the loop below is quicker without divisions. */
  private static final double[] ONE_OVER = new double[MOST_BELOW_NORMAL + 1];

  static {
    for (int number = 1; number <= MOST_BELOW_NORMAL; number++) {
      ONE_OVER[number] = 1.0 / number;
    }
  }

  private Counting() {}

  /**
   * A count of which {@code mean} are expected.
   *
   * <p>Below {@link #NORMAL_FROM} by inversion of the distribution, exact; from there on by a
   * rounded normal distribution of the same mean and variance.
   */
  static long poisson(double mean, SplittableRandom random) {
    if (!(mean > 0)) {
      return 0;
    }
    if (mean >= NORMAL_FROM) {
      return Math.max(0, Math.round(mean + Math.sqrt(mean) * random.nextGaussian()));
    }
    double left = random.nextDouble();
    double share = Math.exp(-mean);
    int count = 0;
    while (left > share && count < MOST_BELOW_NORMAL) {
      left -= share;
      count++;
      share *= mean * ONE_OVER[count];
    }
    return count;
  }
}
