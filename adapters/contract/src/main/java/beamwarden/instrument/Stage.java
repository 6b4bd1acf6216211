package beamwarden.instrument;

import beamwarden.beam.Point;
import java.time.Duration;

/**
 * The sample stage.
 *
 * @param leftMetres the lowest x it reaches
 * @param rightMetres the highest x it reaches
 * @param bottomMetres the lowest y it reaches
 * @param topMetres the highest y it reaches
 * @param speedMetresPerSecond its speed along an axis, above zero
 * @param accelerationMetresPerSecondSquared its acceleration along an axis, above zero
 * @param settling the wait after a move
 * @param repeatabilityMetres how far off a move may end (a guarantee)
 */
public record Stage(
    double leftMetres,
    double rightMetres,
    double bottomMetres,
    double topMetres,
    double speedMetresPerSecond,
    double accelerationMetresPerSecondSquared,
    Duration settling,
    double repeatabilityMetres) {
  /** Whether the stage reaches a place. */
  public boolean reaches(Point place) {
    return place.xMetres() >= leftMetres
        && place.xMetres() <= rightMetres
        && place.yMetres() >= bottomMetres
        && place.yMetres() <= topMetres;
  }

  /**
   * The time of a move and its settling; none when the stage is already there. Both axes move
   * together and the slower one decides: d/v + v/a for a distance d of at least v²/a, else
   * 2·sqrt(d/a), the trapezoid and the triangle of uniform acceleration.
   */
  public Duration travel(Point from, Point to) {
    double distance =
        Math.max(Math.abs(to.xMetres() - from.xMetres()), Math.abs(to.yMetres() - from.yMetres()));
    if (distance == 0) {
      return Duration.ZERO;
    }
    return seconds(move(distance)).plus(settling);
  }

  private double move(double distance) {
    double v = speedMetresPerSecond;
    double a = accelerationMetresPerSecondSquared;
    return distance >= v * v / a ? distance / v + v / a : 2 * Math.sqrt(distance / a);
  }

  private static Duration seconds(double seconds) {
    return Duration.ofNanos(Math.round(seconds * 1e9));
  }
}
