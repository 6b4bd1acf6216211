package beamwarden.beam;

/**
 * Where a sample sits on the holder: what carries its coordinates to the stage's.
 *
 * @param origin the stage position of the sample's own origin
 * @param turnDegrees how far the sample's axes are turned counter-clockwise from the stage's
 * @param uncertaintyMetres how far off the placement may be anywhere on the sample, zero or more
 */
public record Placement(Point origin, double turnDegrees, double uncertaintyMetres) {
  /** Refuses a negative uncertainty. */
  public Placement {
    if (!(uncertaintyMetres >= 0)) {
      throw new IllegalArgumentException("a placement's uncertainty must be zero or more");
    }
  }

  /** The stage position of a place on the sample. */
  public Point toStage(Point onSample) {
    Point turned = onSample.turned(turnDegrees);
    return origin.plus(turned.xMetres(), turned.yMetres());
  }
}
