package beamwarden.clockwork;

import static org.junit.jupiter.api.Assertions.assertNotNull;
import static org.junit.jupiter.api.Assertions.assertNull;

import java.time.Duration;
import java.time.Instant;
import java.time.InstantSource;
import java.util.concurrent.BlockingQueue;
import java.util.concurrent.LinkedBlockingQueue;
import java.util.concurrent.TimeUnit;

/**
 * A listener that keeps what it is told, each alarm with the moment on the line at which it came.
 */
final class Told implements ClockListener {
  private static final long PATIENCE_SECONDS = 20;

  private final InstantSource line;
  private final BlockingQueue<Arrival> arrivals = new LinkedBlockingQueue<>();
  private final BlockingQueue<Duration> steps = new LinkedBlockingQueue<>();

  record Arrival(Alarm alarm, Instant at) {}

  Told(InstantSource line) {
    this.line = line;
  }

  @Override
  public void due(Alarm alarm) {
    arrivals.add(new Arrival(alarm, line.instant()));
  }

  @Override
  public void wallStepped(Duration step) {
    steps.add(step);
  }

  @Override
  public void stalled(Alarm alarm, Duration since) {}

  Arrival next() throws InterruptedException {
    return polled(arrivals);
  }

  Duration nextStep() throws InterruptedException {
    return polled(steps);
  }

  private static <T> T polled(BlockingQueue<T> queue) throws InterruptedException {
    T next = queue.poll(PATIENCE_SECONDS, TimeUnit.SECONDS);
    assertNotNull(next, "nothing came");
    return next;
  }

  void assertNothingElse() {
    assertNull(arrivals.poll());
  }
}
