package beamwarden.dose;

import java.time.Duration;

/**
 * How much of a job there is to do.
 *
 * @param units lines, or nanoseconds at points
 * @param beamOn how long the beam is on in its pixels
 * @param duration how long its scans take, flyback included; no set-up, no stage
 * @param exposures how many exposures it is cut into
 * @param passes how many passes have something left to do
 */
public record Work(long units, Duration beamOn, Duration duration, int exposures, int passes) {
  /** Nothing to do. */
  static final Work NONE = new Work(0, Duration.ZERO, Duration.ZERO, 0, 0);

  Work plus(Work other) {
    return new Work(
        units + other.units,
        beamOn.plus(other.beamOn),
        duration.plus(other.duration),
        exposures + other.exposures,
        passes + other.passes);
  }
}
