package beamwarden.beam;

/**
 * A rectangle that may be turned about its centre.
 *
 * @param centre its centre
 * @param widthMetres its extent along its own x axis, above zero
 * @param heightMetres its extent along its own y axis, above zero
 * @param turnDegrees how far its axes are turned counter-clockwise from the sample's
 */
public record Rectangle(Point centre, double widthMetres, double heightMetres, double turnDegrees)
    implements Region {
  /** Refuses an empty or infinite rectangle. */
  public Rectangle {
    if (!(widthMetres > 0 && heightMetres > 0)
        || !Double.isFinite(widthMetres + heightMetres + turnDegrees)) {
      throw new IllegalArgumentException(
          "a rectangle needs a width and height above zero, not "
              + widthMetres
              + " m by "
              + heightMetres
              + " m");
    }
  }

  /** A rectangle along the sample's axes. */
  public static Rectangle of(Point centre, double widthMetres, double heightMetres) {
    return new Rectangle(centre, widthMetres, heightMetres, 0);
  }

  /** The area in square metres. */
  public double areaSquareMetres() {
    return widthMetres * heightMetres;
  }

  /** The place that lies at the given offset from the centre, along this rectangle's own axes. */
  public Point at(double alongWidthMetres, double alongHeightMetres) {
    Point offset = new Point(alongWidthMetres, alongHeightMetres).turned(turnDegrees);
    return centre.plus(offset.xMetres(), offset.yMetres());
  }
}
