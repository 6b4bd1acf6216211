package beamwarden.dose;

import beamwarden.beam.Exposure;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import java.time.Duration;

/**
 * The guarantees on which an upper value rests, as they stood when the grant was stored.
 *
 * @param calibration how far off a scanned length may be, as a part of it
 * @param repeatabilityMetres how far off a stage move may end
 * @param placementMetres how far off the sample's placement may be
 * @param blanking how long the beam may stay on after it should be off
 * @param blanksFlyback whether the beam is off between two lines
 * @param probeMetres the full width of the probe at half maximum; 0 when nobody measured it
 */
public record Tolerances(
    double calibration,
    double repeatabilityMetres,
    double placementMetres,
    Duration blanking,
    boolean blanksFlyback,
    double probeMetres) {
  /** What a profile guarantees for an exposure, and its placement. */
  public static Tolerances of(Abilities abilities, Exposure exposure) {
    return new Tolerances(
        abilities.field().calibration(),
        abilities.stage().repeatabilityMetres(),
        exposure.placement().uncertaintyMetres(),
        abilities.blanker().alone().orElse(Duration.ZERO),
        abilities.blanker().kind() == Blanker.Kind.FAST,
        ProbeTable.diameterMetres(abilities.probes(), exposure.conditions().beam()));
  }
}
