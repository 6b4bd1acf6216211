package beamwarden.beam;

import java.time.Duration;

/**
 * The probe rests at one place: a time slice of a longer count.
 *
 * @param at where
 * @param time how long, above zero
 */
public record SpotScan(Point at, Duration time) implements Scan {
  /** Refuses a rest that takes no time. */
  public SpotScan {
    if (time.isZero() || time.isNegative()) {
      throw new IllegalArgumentException("a spot needs a time above zero");
    }
  }

  @Override
  public Duration beamOn() {
    return time;
  }

  @Override
  public Duration duration() {
    return time;
  }

  @Override
  public long units() {
    return time.toNanos();
  }
}
