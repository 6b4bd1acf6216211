package beamwarden.dose;

import beamwarden.beam.Point;
import beamwarden.quantity.Fluence;
import beamwarden.queue.Averaging;
import beamwarden.queue.Sample;

/**
 * The highest local fluence somewhere.
 *
 * @param fluence the fluence
 * @param at a place on the sample where it is reached
 */
public record LocalFluence(Fluence fluence, Point at) {
  /**
   * The upper value at one place, everything counted.
   *
   * @param turnDegrees along which axes the sums are made: what is turned against them counts as
   *     the smallest box around it
   */
  public static Fluence upperAt(
      Sample sample, SampleDose dose, Averaging averaging, Point at, double turnDegrees) {
    View view = View.everywhere(averaging, sample, Worth.UPPER);
    return new Fluence(
        view.sumAt(dose.at(sample.placement()).exposed(), at, new Axes(turnDegrees)));
  }
}
