package beamwarden.quantity;

/**
 * An electric charge; what a probe current sends into a sample in a time.
 *
 * @param coulombs the value in coulombs; any finite number
 */
public record Charge(double coulombs) implements Comparable<Charge> {
  /** Refuses what is not a finite number. */
  public Charge {
    Finite.require("charge", coulombs);
  }

  @Override
  public int compareTo(Charge other) {
    return Double.compare(coulombs, other.coulombs);
  }

  @Override
  public String toString() {
    return Prefixed.print(coulombs, "C");
  }
}
