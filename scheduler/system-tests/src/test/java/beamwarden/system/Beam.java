package beamwarden.system;

import beamwarden.beam.Point;
import beamwarden.beam.Rectangle;
import java.time.Instant;

/**
 * A stretch of beam as the instrument's own record tells it: the truth against which books are
 * held.
 *
 * @param began the first electron
 * @param ended the last electron
 * @param grant the grant's number; 0 when nobody granted it
 * @param sample the sample's id
 * @param spot whether the beam rested at the centre
 * @param outline where the electrons went; of a spot the probe's own size
 * @param electrons how many
 * @param amperes the mean current while the beam was on
 */
record Beam(
    Instant began,
    Instant ended,
    long grant,
    String sample,
    boolean spot,
    Rectangle outline,
    double electrons,
    double amperes) {
  private static final double SQUARE_METRES_PER_SQUARE_NANOMETRE = 1e-18;

  /**
   * What it gave a place, in e/nm2: evenly over a rectangle; of a spot a Gaussian whose width is
   * the averaging length.
   *
   * @param place the place, in sample coordinates
   * @param sigmaMetres the rms width over which a cap averages
   */
  double fluenceAt(Point place, double sigmaMetres) {
    Point centre = outline.centre();
    double dx = place.xMetres() - centre.xMetres();
    double dy = place.yMetres() - centre.yMetres();
    if (spot) {
      double area = 2 * Math.PI * sigmaMetres * sigmaMetres;
      double fall = Math.exp(-(dx * dx + dy * dy) / (2 * sigmaMetres * sigmaMetres));
      return electrons * fall / area * SQUARE_METRES_PER_SQUARE_NANOMETRE;
    }
    Point own = new Point(dx, dy).turned(-outline.turnDegrees());
    boolean inside =
        Math.abs(own.xMetres()) < outline.widthMetres() / 2
            && Math.abs(own.yMetres()) < outline.heightMetres() / 2;
    return inside ? electrons / outline.areaSquareMetres() * SQUARE_METRES_PER_SQUARE_NANOMETRE : 0;
  }
}
