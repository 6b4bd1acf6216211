package beamwarden.quantity;

/**
 * The accelerating voltage of an electron column.
 *
 * @param volts the value in volts; any finite number
 */
public record Voltage(double volts) implements Comparable<Voltage> {
  /** Refuses what is not a finite number. */
  public Voltage {
    Finite.require("voltage", volts);
  }

  @Override
  public int compareTo(Voltage other) {
    return Double.compare(volts, other.volts);
  }

  @Override
  public String toString() {
    return Prefixed.print(volts, "V");
  }
}
