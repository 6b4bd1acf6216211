package beamwarden.quantity;

import java.time.Duration;

/**
 * A probe current: electrons that reach the sample per second, times the elementary charge.
 *
 * @param amperes the value in amperes; any finite number
 */
public record Current(double amperes) implements Comparable<Current> {
  /** The elementary charge in coulombs, exact (SI Brochure, 9th edition). */
  public static final double ELEMENTARY_CHARGE_COULOMBS = 1.602176634e-19;

  /** Refuses what is not a finite number. */
  public Current {
    Finite.require("current", amperes);
  }

  /** Electrons that this current sends in {@code time}: N = I·t/e. */
  public double electronsIn(Duration time) {
    return amperes * seconds(time) / ELEMENTARY_CHARGE_COULOMBS;
  }

  /** Charge that this current sends in {@code time}: Q = I·t. */
  public Charge chargeIn(Duration time) {
    return new Charge(amperes * seconds(time));
  }

  /** This current times a pure number. */
  public Current times(double factor) {
    return new Current(amperes * factor);
  }

  /** The larger of the two. */
  public Current max(Current other) {
    return amperes >= other.amperes ? this : other;
  }

  private static double seconds(Duration time) {
    return time.getSeconds() + time.getNano() * 1e-9;
  }

  @Override
  public int compareTo(Current other) {
    return Double.compare(amperes, other.amperes);
  }

  @Override
  public String toString() {
    return Prefixed.print(amperes, "A");
  }
}
