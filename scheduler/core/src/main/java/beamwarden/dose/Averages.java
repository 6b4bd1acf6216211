package beamwarden.dose;

import beamwarden.physics.Formula;
import beamwarden.physics.GaussianSpot;
import beamwarden.physics.GenerationRange;
import beamwarden.quantity.Voltage;
import beamwarden.queue.Averaging;
import beamwarden.queue.Material;
import java.util.Optional;

/**
 * Over what width the dose of a sample's passes is averaged.
 *
 * @param averaging what the cap says
 * @param range how far electrons reach into the sample, where its material is known
 */
record Averages(Averaging averaging, Optional<GenerationRange> range) {
  /** For a cap on a sample of that material. */
  static Averages of(Averaging averaging, Optional<Material> material) {
    return new Averages(averaging, range(material));
  }

  /** What lets a pass reach farthest: its generation range where that is known. */
  static Averages widest(Optional<Material> material) {
    return of(
        material.isPresent() ? new Averaging.OverGeneration() : new Averaging.OverProbe(),
        material);
  }

  private static Optional<GenerationRange> range(Optional<Material> material) {
    return material.map(
        known ->
            new GenerationRange(Formula.parse(known.formula()), known.gramsPerCubicCentimetre()));
  }

  /** Why the fluence of a pass cannot be said over this width, as the end of a sentence. */
  Optional<String> obstacle(PassKey pass) {
    if (averaging instanceof Averaging.OverGeneration && range.isEmpty()) {
      return Optional.of(
          "it averages over the generation range, and the sample's material is not known;"
              + " state the material, or a length to average over");
    }
    if (sigmaMetres(pass) == 0) {
      return Optional.of(
          "it averages over the probe, and the instrument profile has no measured probe;"
              + " add one, or state a length to average over");
    }
    return Optional.empty();
  }

  /**
   * The standard deviation of the Gaussian that a pixel of the pass gives: σ² = σ_probe² + σ_over²,
   * in metres; 0 when neither is known.
   */
  double sigmaMetres(PassKey pass) {
    double probe = GaussianSpot.sigma(pass.tolerances().probeMetres());
    return Math.hypot(probe, GaussianSpot.sigma(overMetres(pass.conditions().beam().voltage())));
  }

  private double overMetres(Voltage voltage) {
    if (averaging instanceof Averaging.OverLength over) {
      return over.width().metres();
    }
    if (averaging instanceof Averaging.OverProbe) {
      return 0;
    }
    return range.map(known -> known.at(voltage).metres()).orElse(0.0);
  }
}
