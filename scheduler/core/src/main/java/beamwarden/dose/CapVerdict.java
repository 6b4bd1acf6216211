package beamwarden.dose;

import beamwarden.beam.Point;
import beamwarden.queue.Cap;
import java.util.Optional;

/** Whether a sample's caps leave room for what is asked. */
public sealed interface CapVerdict {
  /** All caps hold with it. */
  record Admitted() implements CapVerdict {}

  /**
   * A cap would not hold with it. All values are upper values.
   *
   * @param cap the cap that binds; a keep-out area is a fluence cap of zero
   * @param unit the unit of the values: e/nm2 or C
   * @param asked what it would add where the cap binds
   * @param booked what is counted there already
   * @param limit the cap's limit
   * @param at where it binds, when it binds somewhere
   * @param because what binds, in one sentence
   */
  record Refused(
      Cap cap,
      String unit,
      double asked,
      double booked,
      double limit,
      Optional<Point> at,
      String because)
      implements CapVerdict {}
}
