package beamwarden.quantity;

/**
 * A distance or a coordinate.
 *
 * @param metres the value in metres; any finite number
 */
public record Length(double metres) implements Comparable<Length> {
  /** Refuses what is not a finite number. */
  public Length {
    Finite.require("length", metres);
  }

  @Override
  public int compareTo(Length other) {
    return Double.compare(metres, other.metres);
  }

  @Override
  public String toString() {
    return Prefixed.print(metres, "m");
  }
}
