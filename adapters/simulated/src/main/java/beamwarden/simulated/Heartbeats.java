package beamwarden.simulated;

import java.util.OptionalLong;
import java.util.TreeMap;

/** When the numbered heartbeats of this connection came, on the adapter's own elapsed time. */
final class Heartbeats {
  /** How many are remembered; a grant that refers to an older one is too late anyway. */
  private static final int REMEMBERED = 1024;

  private final TreeMap<Long, Long> arrivals = new TreeMap<>();
  private long lastNanos = Long.MIN_VALUE;

  /** A new connection counts from its own first number; the last beat keeps its time. */
  void startAnew() {
    arrivals.clear();
  }

  /**
   * Takes a heartbeat.
   *
   * @return false when its number is not above the last one, and it does not count
   */
  boolean beat(long number, long nowNanos) {
    if (!arrivals.isEmpty() && number <= arrivals.lastKey()) {
      return false;
    }
    arrivals.put(number, nowNanos);
    lastNanos = nowNanos;
    if (arrivals.size() > REMEMBERED) {
      arrivals.pollFirstEntry();
    }
    return true;
  }

  /** When a heartbeat came, if it did. */
  OptionalLong arrival(long number) {
    Long came = arrivals.get(number);
    return came == null ? OptionalLong.empty() : OptionalLong.of(came);
  }

  /** When the last one came, in this connection or an earlier one. */
  OptionalLong last() {
    return lastNanos == Long.MIN_VALUE ? OptionalLong.empty() : OptionalLong.of(lastNanos);
  }
}
