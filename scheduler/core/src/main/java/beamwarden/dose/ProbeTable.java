package beamwarden.dose;

import beamwarden.beam.BeamSettings;
import beamwarden.instrument.Probe;
import java.util.Comparator;
import java.util.List;
import java.util.function.Predicate;

/**
 * Reads a table of measured probes: between its lines the larger neighbour counts.
 *
 * <p>Neighbours are the nearest line, by ratio, in each of the four quarters that settings divide
 * the table into: voltage at or below, at or above, and the same for the current.
 */
final class ProbeTable {
  private ProbeTable() {}

  /** The full width at half maximum in metres; 0 when the table is empty. */
  static double diameterMetres(List<Probe> table, BeamSettings beam) {
    double volts = beam.voltage().volts();
    double amperes = beam.current().amperes();
    Predicate<Probe> below = probe -> probe.voltage().volts() <= volts;
    Predicate<Probe> above = probe -> probe.voltage().volts() >= volts;
    Predicate<Probe> weaker = probe -> probe.current().amperes() <= amperes;
    Predicate<Probe> stronger = probe -> probe.current().amperes() >= amperes;
    Comparator<Probe> nearest =
        Comparator.comparingDouble(
            probe ->
                Math.abs(Math.log(probe.voltage().volts() / volts))
                    + Math.abs(Math.log(probe.current().amperes() / amperes)));
    double largest = 0;
    for (Predicate<Probe> quarter :
        List.of(below.and(weaker), below.and(stronger), above.and(weaker), above.and(stronger))) {
      largest =
          Math.max(
              largest,
              table.stream()
                  .filter(quarter)
                  .min(nearest)
                  .map(probe -> probe.diameter().metres())
                  .orElse(0.0));
    }
    return largest;
  }
}
