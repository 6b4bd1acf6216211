package beamwarden.queue;

import beamwarden.quantity.Length;

/** Over what length a fluence cap averages: the full width at half maximum of a Gaussian. */
public sealed interface Averaging {
  /** The generation range of the sample's material at the job's voltage (Kanaya-Okayama). */
  record OverGeneration() implements Averaging {}

  /** The probe alone: for what is damaged at the surface. */
  record OverProbe() implements Averaging {}

  /**
   * A stated length.
   *
   * @param width full width at half maximum, above zero
   */
  record OverLength(Length width) implements Averaging {}
}
