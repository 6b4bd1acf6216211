package beamwarden.instrument;

import beamwarden.quantity.Current;
import beamwarden.quantity.Length;
import beamwarden.quantity.Voltage;

/**
 * A measured probe.
 *
 * @param voltage the voltage at which it was measured
 * @param current the probe current at which it was measured
 * @param diameter its full width at half maximum
 */
public record Probe(Voltage voltage, Current current, Length diameter) {}
