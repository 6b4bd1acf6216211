package beamwarden.beam;

import beamwarden.quantity.Current;
import beamwarden.quantity.Voltage;

/**
 * What the electron column is set to.
 *
 * @param voltage the accelerating voltage, above zero
 * @param current the wished probe current, above zero; what flows is measured
 */
public record BeamSettings(Voltage voltage, Current current) {
  /** Refuses settings of zero or below. */
  public BeamSettings {
    if (!(voltage.volts() > 0 && current.amperes() > 0)) {
      throw new IllegalArgumentException(
          "voltage and current must be above zero, not " + voltage + " and " + current);
    }
  }
}
