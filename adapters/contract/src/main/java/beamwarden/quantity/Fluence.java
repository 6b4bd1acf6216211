package beamwarden.quantity;

import java.util.Locale;

/**
 * Electrons per area.
 *
 * @param electronsPerSquareNanometre the value in e/nm²; 1 e/nm² = 0.160217663 C/m² = 0.01 e/Å²
 */
public record Fluence(double electronsPerSquareNanometre) implements Comparable<Fluence> {
  /** No electrons at all. */
  public static final Fluence ZERO = new Fluence(0);

  /** Refuses what is not a finite number. */
  public Fluence {
    Finite.require("fluence", electronsPerSquareNanometre);
  }

  /** The same fluence in C/m². */
  public double coulombsPerSquareMetre() {
    return electronsPerSquareNanometre * Current.ELEMENTARY_CHARGE_COULOMBS * 1e18;
  }

  /** The sum of the two. */
  public Fluence plus(Fluence other) {
    return new Fluence(electronsPerSquareNanometre + other.electronsPerSquareNanometre);
  }

  @Override
  public int compareTo(Fluence other) {
    return Double.compare(electronsPerSquareNanometre, other.electronsPerSquareNanometre);
  }

  @Override
  public String toString() {
    return String.format(Locale.ROOT, "%.4g e/nm2", electronsPerSquareNanometre);
  }
}
