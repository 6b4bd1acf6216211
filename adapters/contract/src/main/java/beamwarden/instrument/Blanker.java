package beamwarden.instrument;

import java.time.Duration;
import java.util.Optional;

/**
 * What keeps the beam off the sample.
 *
 * @param kind how quickly the daemon may use it
 * @param alone the longest time in which the instrument turns the beam off by itself when a grant's
 *     time is used up, without the daemon (a guarantee); empty when it cannot
 */
public record Blanker(Kind kind, Optional<Duration> alone) {
  /** How a beam is kept off. */
  public enum Kind {
    /** Between lines and pixels: the beam is on in pixels only. */
    FAST,
    /** Between scans only: the beam stays on during flyback. */
    SLOW,
    /** Not at all: the beam is parked somewhere while it waits. */
    NONE
  }
}
