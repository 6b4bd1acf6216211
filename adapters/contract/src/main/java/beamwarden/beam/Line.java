package beamwarden.beam;

/**
 * A straight line that the probe follows from one end to the other.
 *
 * @param from where it begins
 * @param to where it ends, another place than {@code from}
 */
public record Line(Point from, Point to) implements Region {
  /** Refuses a line without length. */
  public Line {
    if (!(from.distanceMetres(to) > 0)) {
      throw new IllegalArgumentException("a line needs two different ends");
    }
  }
}
