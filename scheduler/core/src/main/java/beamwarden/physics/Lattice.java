package beamwarden.physics;

/**
 * How uneven a raster of Gaussian spots is along one axis, as a part of its mean.
 *
 * <p>Every method takes σ/p: the spot's standard deviation over the pixel pitch, above zero. The
 * profile is the theta function θ₃(πu, q) with q = exp(−2π²(σ/p)²) (DLMF chapter 20), which is
 * summed over wave numbers where spots are wide and over spots where they are narrow; both sums are
 * the same function and four terms of either give double precision on its side. A raster's highest
 * over its mean is the product of the factors of both axes.
 */
public final class Lattice {
  /** Where the two sums swap: 1/√(2π). */
  private static final double CROSSING = 1 / Math.sqrt(2 * Math.PI);

  private static final int TERMS = 5;

  private Lattice() {}

  /** The highest over the mean, at a spot's centre: 1 or more, infinite for spots without width. */
  public static double highest(double sigmaOverPitch) {
    return 1 + excess(sigmaOverPitch);
  }

  /** The lowest over the mean, half-way between two spots: from 0 to 1. */
  public static double lowest(double sigmaOverPitch) {
    return sigmaOverPitch >= CROSSING
        ? 1 + overWaves(sigmaOverPitch, 0.5)
        : overSpots(sigmaOverPitch, 0.5);
  }

  /** The root mean square deviation from the mean over the mean, of a raster of square pitch. */
  public static double deviation(double sigmaOverPitch) {
    double meanSquareExcess = excess(sigmaOverPitch * Math.sqrt(2));
    return Math.sqrt(meanSquareExcess * (2 + meanSquareExcess));
  }

  /** The profile less its mean, 1; kept apart from it, since it may be far below one rounding. */
  private static double excess(double s) {
    if (!(s >= 0)) {
      throw new IllegalArgumentException("a spot's width must not be below 0, and is " + s);
    }
    if (s == 0) {
      return Double.POSITIVE_INFINITY;
    }
    return s >= CROSSING ? overWaves(s, 0) : overSpots(s, 0) - 1;
  }

  private static double overWaves(double s, double u) {
    double sum = 0;
    for (int k = TERMS; k >= 1; k--) {
      sum += Math.exp(-2 * Math.PI * Math.PI * s * s * k * k) * Math.cos(2 * Math.PI * k * u);
    }
    return 2 * sum;
  }

  private static double overSpots(double s, double u) {
    double sum = 0;
    for (int m = -TERMS; m <= TERMS; m++) {
      double distance = (m - u) / s;
      sum += Math.exp(-distance * distance / 2);
    }
    return sum / (s * Math.sqrt(2 * Math.PI));
  }
}
