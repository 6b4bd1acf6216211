package beamwarden.dose;

import beamwarden.beam.Placement;
import beamwarden.instrument.Abilities;
import java.time.Duration;

/**
 * The guarantees on which an upper value rests, as they stood when the grant was stored.
 *
 * @param calibration how far off a scanned length may be, as a part of it
 * @param repeatabilityMetres how far off a stage move may end
 * @param placementMetres how far off the sample's placement may be
 * @param blanking how long the beam may stay on after it should be off
 */
public record Tolerances(
    double calibration, double repeatabilityMetres, double placementMetres, Duration blanking) {
  /** What a profile and a placement guarantee. */
  public static Tolerances of(Abilities abilities, Placement placement) {
    return new Tolerances(
        abilities.field().calibration(),
        abilities.stage().repeatabilityMetres(),
        placement.uncertaintyMetres(),
        abilities.blanker().alone().orElse(Duration.ZERO));
  }
}
