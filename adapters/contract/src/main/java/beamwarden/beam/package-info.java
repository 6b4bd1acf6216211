/**
 * What a queue and an instrument both speak: regions, beam settings, modes, scans, exposures.
 *
 * <p>Coordinates are metres in the sample's own plane, x to the right and y up. A {@linkplain
 * beamwarden.beam.Placement placement} carries them to the stage. May import {@code quantity}.
 */
package beamwarden.beam;
