package beamwarden.timing;

/** Elapsed time that never steps back, from an origin of its own. */
@FunctionalInterface
public interface Ticker {
  /** Nanoseconds since the origin. */
  long elapsedNanos();
}
