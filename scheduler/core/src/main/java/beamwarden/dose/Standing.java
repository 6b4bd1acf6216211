package beamwarden.dose;

import beamwarden.beam.Point;
import beamwarden.queue.Cap;
import java.util.Optional;

/**
 * How much of a cap is used.
 *
 * @param cap the cap
 * @param unit the unit of the values: e/nm2 or C
 * @param limit the cap's limit
 * @param best the best value of what is booked
 * @param upper the upper value of what is booked, by which the cap is enforced
 * @param at where the upper value is reached, for a fluence
 */
public record Standing(
    Cap cap, String unit, double limit, double best, double upper, Optional<Point> at) {
  /** What the cap leaves; zero when nothing. */
  public double left() {
    return Math.max(0, limit - upper);
  }
}
