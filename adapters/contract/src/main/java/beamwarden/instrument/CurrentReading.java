package beamwarden.instrument;

import beamwarden.beam.BeamSettings;
import beamwarden.quantity.Current;

/**
 * A measured probe current.
 *
 * @param settings what the column was set to
 * @param current what the meter showed
 */
public record CurrentReading(BeamSettings settings, Current current) {}
