package beamwarden.instrument;

import beamwarden.beam.BeamSettings;
import beamwarden.quantity.Current;
import beamwarden.quantity.Voltage;
import java.time.Duration;

/**
 * The electron column.
 *
 * @param lowestVoltage the lowest accelerating voltage
 * @param highestVoltage the highest accelerating voltage
 * @param voltageSettling the wait after a change of voltage
 * @param lowestCurrent the lowest probe current
 * @param highestCurrent the highest probe current
 * @param currentSettling the wait after a change of current
 */
public record Column(
    Voltage lowestVoltage,
    Voltage highestVoltage,
    Duration voltageSettling,
    Current lowestCurrent,
    Current highestCurrent,
    Duration currentSettling) {
  /** The wait after a change of settings; none when nothing changes. Waits run side by side. */
  public Duration settling(BeamSettings from, BeamSettings to) {
    if (!from.voltage().equals(to.voltage())) {
      return longestSettling();
    }
    return from.current().equals(to.current()) ? Duration.ZERO : currentSettling;
  }

  /** The wait after a change of everything, or from settings that are not known. */
  public Duration longestSettling() {
    return voltageSettling.compareTo(currentSettling) > 0 ? voltageSettling : currentSettling;
  }
}
