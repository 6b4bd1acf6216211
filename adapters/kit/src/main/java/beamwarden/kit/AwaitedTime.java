package beamwarden.kit;

import beamwarden.timing.Timeline;
import java.time.Duration;
import java.time.Instant;
import java.util.concurrent.locks.LockSupport;
import java.util.function.BooleanSupplier;

/** Time that passes by itself; the waiting thread looks again every millisecond. */
record AwaitedTime(Timeline line) implements Passage {
  private static final long LOOK_EVERY_NANOS = 1_000_000;

  @Override
  public Instant now() {
    return line.instant();
  }

  @Override
  public boolean until(BooleanSupplier isSo, Duration atMost) {
    long from = line.elapsedNanos();
    while (!isSo.getAsBoolean()) {
      if (line.elapsedNanos() - from >= atMost.toNanos()) {
        return false;
      }
      if (Thread.currentThread().isInterrupted()) {
        throw new IllegalStateException("interrupted while waiting for the instrument");
      }
      LockSupport.parkNanos(LOOK_EVERY_NANOS);
    }
    return true;
  }
}
