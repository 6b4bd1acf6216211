package beamwarden.dose;

import beamwarden.beam.Exposure;
import beamwarden.quantity.Current;
import java.time.Duration;

/**
 * What one exposure gave a sample, or may yet give: the facts from which its dose is computed.
 *
 * @param grant the grant's number
 * @param stay the stretch without a move of the stage in which it was made: parts of one pass of
 *     one stay do not add at their joins
 * @param exposure what was exposed
 * @param unitsTouched units, from the first of the scan on, into which electrons may have gone
 * @param bestBeamOn the best value of the time the beam was on
 * @param upperBeamOn the longest time it can have been on
 * @param bestCurrent the best value of the current
 * @param upperCurrent the highest current that can have flowed
 * @param tolerances the guarantees on which the upper values rest
 */
public record Delivery(
    long grant,
    long stay,
    Exposure exposure,
    long unitsTouched,
    Duration bestBeamOn,
    Duration upperBeamOn,
    Current bestCurrent,
    Current upperCurrent,
    Tolerances tolerances) {
  /** Refuses values that contradict each other. */
  public Delivery {
    if (unitsTouched < 0 || unitsTouched > exposure.scan().units()) {
      throw new IllegalArgumentException(
          "grant " + grant + " cannot touch " + unitsTouched + " units");
    }
    if (bestBeamOn.compareTo(upperBeamOn) > 0 || bestCurrent.compareTo(upperCurrent) > 0) {
      throw new IllegalArgumentException(
          "grant " + grant + ": a best value is above its upper value");
    }
  }

  /** The same with a higher upper current, when a later reading showed more. */
  public Delivery withUpperCurrent(Current higher) {
    return new Delivery(
        grant,
        stay,
        exposure,
        unitsTouched,
        bestBeamOn,
        upperBeamOn,
        bestCurrent,
        higher.max(upperCurrent),
        tolerances);
  }
}
