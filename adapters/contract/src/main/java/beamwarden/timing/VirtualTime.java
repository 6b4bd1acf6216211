package beamwarden.timing;

import java.time.Duration;
import java.time.Instant;
import java.util.PriorityQueue;

/**
 * Time that stands still until it is moved: a night passes in the time its tasks take to run.
 *
 * <p>Not safe for use by several threads; tasks run on the thread that moves the time.
 */
public final class VirtualTime implements Timeline {
  private final Instant origin;
  private final PriorityQueue<Task> tasks = new PriorityQueue<>();
  private long nowNanos;
  private long asked;

  /** A line that begins at {@code origin}. */
  public VirtualTime(Instant origin) {
    this.origin = origin;
  }

  @Override
  public Instant instant() {
    return origin.plusNanos(nowNanos);
  }

  @Override
  public long elapsedNanos() {
    return nowNanos;
  }

  @Override
  public Waiting after(Duration delay, Runnable task) {
    Task waiting = new Task(nowNanos + Math.max(0, delay.toNanos()), asked++, task);
    tasks.add(waiting);
    return waiting;
  }

  /**
   * Moves to the next task and runs it.
   *
   * @return false when nothing is waiting, and time stays where it is
   */
  public boolean runNext() {
    Task next = tasks.poll();
    while (next != null && next.cancelled) {
      next = tasks.poll();
    }
    if (next == null) {
      return false;
    }
    nowNanos = next.dueNanos;
    next.run();
    return true;
  }

  /** Runs everything that is due up to {@code until}, then stands at {@code until}. */
  public void runUntil(Instant until) {
    long limit = Duration.between(origin, until).toNanos();
    while (!tasks.isEmpty() && tasks.peek().dueNanos <= limit) {
      runNext();
    }
    nowNanos = Math.max(nowNanos, limit);
  }

  private static final class Task implements Waiting, Comparable<Task> {
    private final long dueNanos;
    private final long order;
    private final Runnable work;
    private boolean cancelled;

    Task(long dueNanos, long order, Runnable work) {
      this.dueNanos = dueNanos;
      this.order = order;
      this.work = work;
    }

    void run() {
      work.run();
    }

    @Override
    public void cancel() {
      cancelled = true;
    }

    @Override
    public int compareTo(Task other) {
      int byTime = Long.compare(dueNanos, other.dueNanos);
      return byTime != 0 ? byTime : Long.compare(order, other.order);
    }
  }
}
