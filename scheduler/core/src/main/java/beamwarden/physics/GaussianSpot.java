package beamwarden.physics;

/**
 * A round spot whose fluence falls off as a Gaussian.
 *
 * @param sigmaMetres the standard deviation along an axis, above zero
 */
public record GaussianSpot(double sigmaMetres) {
  /** Full width at half maximum over standard deviation: 2·√(2·ln 2). */
  public static final double WIDTH_OVER_SIGMA = 2 * Math.sqrt(2 * Math.log(2));

  /** The mean fluence inside the circle of half maximum over the highest: 1/(2·ln 2). */
  public static final double MEAN_OVER_HIGHEST = 1 / (2 * Math.log(2));

  private static final double SQUARE_NANOMETRES = 1e18;

  /** Refuses a spot without width. */
  public GaussianSpot {
    if (!(sigmaMetres > 0)) {
      throw new IllegalArgumentException("a spot needs a width above zero, not " + sigmaMetres);
    }
  }

  /** The standard deviation of a Gaussian of that full width at half maximum. */
  public static double sigma(double fullWidth) {
    return fullWidth / WIDTH_OVER_SIGMA;
  }

  /** The fluence at the centre, N/(2πσ²), in e/nm² for a number of electrons. */
  public double highest(double electrons) {
    return electrons / (2 * Math.PI * sigmaMetres * sigmaMetres * SQUARE_NANOMETRES);
  }

  /** The fluence at a distance from the centre over that at the centre: exp(−r²/(2σ²)). */
  public double falloff(double distanceMetres) {
    double r = distanceMetres / sigmaMetres;
    return Math.exp(-r * r / 2);
  }

  /**
   * The highest fluence of a line that the spot is swept along: λ/(σ·√(2π)), in e/nm².
   *
   * @param electronsPerMetre electrons per length of the line
   */
  public double highestOfLine(double electronsPerMetre) {
    return electronsPerMetre / (sigmaMetres * Math.sqrt(2 * Math.PI) * SQUARE_NANOMETRES);
  }

  /**
   * The fluence near the straight border of an evenly filled area over that inside it: ½·erfc(d/
   * (σ·√2)).
   *
   * @param outwardMetres the distance from the border, positive outside
   */
  public double edge(double outwardMetres) {
    return 0.5 * erfc(outwardMetres / (sigmaMetres * Math.sqrt(2)));
  }

  /**
   * The complementary error function, within 1e-13 of its value or of 1: its power series up to
   * 2.5, its continued fraction beyond (DLMF 7.6.2, 7.9.1).
   */
  static double erfc(double x) {
    if (x < 0) {
      return 2 - erfc(-x);
    }
    return x < 2.5 ? 1 - bySeries(x) : byFraction(x);
  }

  private static double bySeries(double x) {
    double term = x;
    double sum = x;
    for (int n = 1; n <= 60; n++) {
      term *= 2 * x * x / (2 * n + 1);
      sum += term;
    }
    return 2 / Math.sqrt(Math.PI) * Math.exp(-x * x) * sum;
  }

  private static double byFraction(double x) {
    double tail = x;
    for (int n = 60; n >= 1; n--) {
      tail = x + n / 2.0 / tail;
    }
    return Math.exp(-x * x) / (Math.sqrt(Math.PI) * tail);
  }
}
