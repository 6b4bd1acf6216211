package beamwarden.run;

import java.time.Duration;

/**
 * The waits of a run, on the instrument's own line of time.
 *
 * @param lease the longest time an instrument goes on without a heartbeat
 * @param heartbeatEvery how often one is sent, well below {@code lease}
 * @param answerWithin how long an answer may take beyond the time that the work itself takes
 * @param reconnectAfter the wait before a lost connection is tried again
 */
public record RunSettings(
    Duration lease, Duration heartbeatEvery, Duration answerWithin, Duration reconnectAfter) {
  /** Refuses a heartbeat that comes too seldom to keep a lease. */
  public RunSettings {
    if (heartbeatEvery.multipliedBy(3).compareTo(lease) > 0) {
      throw new IllegalArgumentException(
          "a heartbeat every "
              + heartbeatEvery
              + " cannot keep a lease of "
              + lease
              + "; it must come three times in it");
    }
  }

  /** The usual waits at real time. */
  public static RunSettings usual() {
    return atPace(1);
  }

  /**
   * The usual waits on a line of time that runs {@code pace} times faster: what processes and
   * networks need stays the same in real time.
   */
  public static RunSettings atPace(double pace) {
    double factor = Math.max(1, pace / 5);
    return new RunSettings(
        scaled(60, factor), scaled(15, factor), scaled(30, factor), scaled(5, factor));
  }

  private static Duration scaled(long seconds, double factor) {
    return Duration.ofMillis(Math.round(seconds * 1000 * factor));
  }
}
