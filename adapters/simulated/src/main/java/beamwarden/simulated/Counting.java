package beamwarden.simulated;

import java.util.SplittableRandom;

/** Random counts of independent events: the Poisson distribution. */
final class Counting {
  /** From this mean on a normal distribution is near enough, and much faster. */
  static final double NORMAL_FROM = 30;

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
    long count = 0;
    while (left > share && share > Double.MIN_NORMAL) {
      left -= share;
      count++;
      share *= mean / count;
    }
    return count;
  }
}
