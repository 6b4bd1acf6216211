package beamwarden.shift;

import java.time.Duration;
import java.time.Instant;
import java.util.Optional;

/**
 * Working time on the instrument.
 *
 * @param opens when it opens
 * @param closes when it closes, after {@code opens}
 * @param windDown how long before it closes the wind-down must begin
 * @param unattended whether nobody is there
 * @param latestStart after this moment no exposure starts, if any
 * @param beamOnBudget the longest beam-on time in it, if any
 */
public record Shift(
    Instant opens,
    Instant closes,
    Duration windDown,
    boolean unattended,
    Optional<Instant> latestStart,
    Optional<Duration> beamOnBudget) {
  /** Refuses a shift that closes before it opens. */
  public Shift {
    if (!closes.isAfter(opens)) {
      throw new IllegalArgumentException("a shift must close after it opens, not at " + closes);
    }
  }

  /** When the wind-down begins: no exposure may end later. */
  public Instant usableEnd() {
    return closes.minus(windDown);
  }

  /** Whether a moment lies in it, its close excluded. */
  public boolean covers(Instant moment) {
    return !moment.isBefore(opens) && moment.isBefore(closes);
  }
}
