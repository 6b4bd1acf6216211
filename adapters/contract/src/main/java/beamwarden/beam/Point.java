package beamwarden.beam;

/**
 * A place in a plane.
 *
 * @param xMetres to the right, in metres
 * @param yMetres up, in metres
 */
public record Point(double xMetres, double yMetres) {
  /** Refuses coordinates that are not finite. */
  public Point {
    if (!Double.isFinite(xMetres) || !Double.isFinite(yMetres)) {
      throw new IllegalArgumentException("a point needs finite coordinates");
    }
  }

  /** This point moved by the given distances. */
  public Point plus(double dxMetres, double dyMetres) {
    return new Point(xMetres + dxMetres, yMetres + dyMetres);
  }

  /** This point turned counter-clockwise about the origin. */
  public Point turned(double degrees) {
    if (degrees == 0) {
      return this;
    }
    double radians = Math.toRadians(degrees);
    double cos = Math.cos(radians);
    double sin = Math.sin(radians);
    return new Point(xMetres * cos - yMetres * sin, xMetres * sin + yMetres * cos);
  }

  /** The distance to another point, in metres. */
  public double distanceMetres(Point other) {
    return Math.hypot(xMetres - other.xMetres, yMetres - other.yMetres);
  }
}
