package beamwarden.timing;

import java.time.Duration;
import java.time.Instant;

/**
 * Ties a paced line of time to the wall clock, so that processes that share the anchor share the
 * line, and the line goes on while no process runs.
 *
 * @param onLine a moment on the line
 * @param onWall the wall-clock moment at which it was that time on the line
 * @param pace how many times faster than real time the line runs, above zero; 1 with both moments
 *     equal is real time
 */
public record TimeAnchor(Instant onLine, Instant onWall, double pace) {
  /** Refuses a pace of zero or below. */
  public TimeAnchor {
    if (!(pace > 0) || !Double.isFinite(pace)) {
      throw new IllegalArgumentException("a pace must be above zero, not " + pace);
    }
  }

  /** Real time. */
  public static TimeAnchor real() {
    return new TimeAnchor(Instant.EPOCH, Instant.EPOCH, 1);
  }

  /** The moment on the line at a wall-clock moment. */
  public Instant onLine(Instant wall) {
    return onLine.plus(scaled(Duration.between(onWall, wall), pace));
  }

  /** How long a stretch of the line takes in real time. */
  public Duration real(Duration onTheLine) {
    return scaled(onTheLine, 1 / pace);
  }

  private static Duration scaled(Duration time, double factor) {
    if (factor == 1) {
      return time;
    }
    double seconds = time.getSeconds() * factor;
    long whole = (long) Math.floor(seconds);
    return Duration.ofSeconds(whole, Math.round((seconds - whole) * 1e9 + time.getNano() * factor));
  }
}
