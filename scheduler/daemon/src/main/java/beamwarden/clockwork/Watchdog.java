package beamwarden.clockwork;

import beamwarden.timing.TimeAnchor;
import java.time.Duration;
import java.util.Optional;

/** Judges whether the wall clock was set and whether the engine hangs. Not safe by itself. */
final class Watchdog {
  /** A smaller difference is the clock being disciplined, and waits may be off by as much. */
  static final Duration STEP_TOLERATED = Duration.ofMillis(500);

  /** An engine that has not set the clock anew in this time hangs. */
  static final Duration STALL_TOLERATED = Duration.ofSeconds(30);

  private Duration ahead;
  private Optional<Alarm> handedOver = Optional.empty();
  private long handedOverNanos;

  /**
   * What a look has found.
   *
   * @param stepped how far the wall clock has jumped since it was last found to
   * @param stalled the alarm after which the engine hangs
   */
  record Finding(Optional<Duration> stepped, Optional<Stall> stalled) {}

  /**
   * An engine that hangs.
   *
   * @param alarm the alarm that was handed over
   * @param since how long ago, in real time
   */
  record Stall(Alarm alarm, Duration since) {}

  /** With how far the wall clock is ahead of elapsed time now. */
  Watchdog(Duration ahead) {
    this.ahead = ahead;
  }

  /** An alarm goes to the engine. The first one that it has not yet answered counts. */
  void handedOver(Alarm alarm, long elapsedNanos) {
    if (handedOver.isEmpty()) {
      handedOver = Optional.of(alarm);
      handedOverNanos = elapsedNanos;
    }
  }

  /** The engine has set the clock anew. */
  void setAnew() {
    handedOver = Optional.empty();
  }

  /**
   * Looks; tells each step and each stall once.
   *
   * @param aheadNow how far the wall clock is ahead of elapsed time now
   * @param elapsedNanos elapsed time on the line
   * @param anchor how the line goes
   */
  Finding look(Duration aheadNow, long elapsedNanos, TimeAnchor anchor) {
    return new Finding(step(aheadNow), stall(elapsedNanos, anchor));
  }

  private Optional<Duration> step(Duration aheadNow) {
    Duration step = aheadNow.minus(ahead);
    if (step.abs().compareTo(STEP_TOLERATED) <= 0) {
      return Optional.empty();
    }
    ahead = aheadNow;
    return Optional.of(step);
  }

  private Optional<Stall> stall(long elapsedNanos, TimeAnchor anchor) {
    Duration since = anchor.real(Duration.ofNanos(elapsedNanos - handedOverNanos));
    if (handedOver.isEmpty() || since.compareTo(STALL_TOLERATED) <= 0) {
      return Optional.empty();
    }
    Optional<Stall> stall = handedOver.map(alarm -> new Stall(alarm, since));
    handedOver = Optional.empty();
    return stall;
  }
}
