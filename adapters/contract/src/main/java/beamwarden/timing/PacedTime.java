package beamwarden.timing;

import java.time.Duration;
import java.time.Instant;
import java.util.concurrent.Executors;
import java.util.concurrent.ScheduledExecutorService;
import java.util.concurrent.ScheduledFuture;
import java.util.concurrent.TimeUnit;

/**
 * A line of time tied to the machine's clock, real or faster.
 *
 * <p>The wall clock is read once, when the line is opened; from then on elapsed time carries it, so
 * that a step of the wall clock cannot shorten a wait. {@link #wallStep()} says how far the two
 * have come apart. Tasks run on one thread of this line's own. Safe for use by several threads.
 */
public final class PacedTime implements Timeline, AutoCloseable {
  private final TimeAnchor anchor;
  private final Instant openedOnWall = Instant.now();
  private final Instant openedOnLine;
  private final long openedNanos = System.nanoTime();
  private final ScheduledExecutorService tasks;

  /** Opens the line; its one thread carries {@code threadName} and does not keep the JVM alive. */
  public PacedTime(TimeAnchor anchor, String threadName) {
    this.anchor = anchor;
    this.openedOnLine = anchor.onLine(openedOnWall);
    this.tasks =
        Executors.newSingleThreadScheduledExecutor(
            task -> {
              Thread thread = new Thread(task, threadName);
              thread.setDaemon(true);
              return thread;
            });
  }

  @Override
  public Instant instant() {
    return openedOnLine.plusNanos(elapsedNanos());
  }

  @Override
  public long elapsedNanos() {
    long real = System.nanoTime() - openedNanos;
    return anchor.pace() == 1 ? real : (long) (real * anchor.pace());
  }

  @Override
  public Waiting after(Duration delay, Runnable task) {
    long realNanos = Math.max(0, anchor.real(delay).toNanos());
    ScheduledFuture<?> waiting = tasks.schedule(task, realNanos, TimeUnit.NANOSECONDS);
    return () -> waiting.cancel(false);
  }

  /**
   * How far the wall clock has run ahead of elapsed time since this line was opened, in real time.
   */
  public Duration wallStep() {
    Duration elapsed = Duration.ofNanos(System.nanoTime() - openedNanos);
    return Duration.between(openedOnWall.plus(elapsed), Instant.now());
  }

  /** Ends the line; what waits on it does not happen. */
  @Override
  public void close() {
    tasks.shutdownNow();
  }
}
