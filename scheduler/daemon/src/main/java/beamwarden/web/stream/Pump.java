package beamwarden.web.stream;

import beamwarden.answer.ProgressAnswer;
import beamwarden.run.Desk;
import beamwarden.web.api.Views;
import java.util.List;
import java.util.Set;
import java.util.concurrent.ConcurrentHashMap;
import java.util.concurrent.Semaphore;
import java.util.concurrent.TimeUnit;
import java.util.function.Supplier;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/** Feeds all followers, on one thread of its own. Safe for use by several threads. */
public final class Pump implements AutoCloseable {
  private static final Logger LOGGER = LoggerFactory.getLogger(Pump.class);

  /** The most connections that may follow at once. */
  private static final int FOLLOWERS_MAX = 64;

  /** How often progress is looked at while somebody follows. */
  private static final long TICK_MILLIS = 250;

  private final Desk desk;
  private final Views views;

  /** Without a lock: a connection that ends leaves while its own lock is held. */
  private final Set<Follower> followers = ConcurrentHashMap.newKeySet();

  private final Thread thread = new Thread(this::run, "event-stream");
  private final AutoCloseable listening;
  private final Semaphore work = new Semaphore(0);
  private volatile boolean closed;

  /** A pump on a run; starts its thread. */
  public Pump(Desk desk) {
    this.desk = desk;
    this.views = new Views(desk);
    this.listening = desk.onRecorded(this::wake);
    thread.setDaemon(true);
    thread.start();
  }

  /** Whether one more may follow. */
  public boolean hasRoom() {
    return followers.size() < FOLLOWERS_MAX;
  }

  /**
   * Lets one follow.
   *
   * @param outlet where its messages go
   * @param after the number of the last entry that it already has; 0 for none
   * @return run when it has gone
   */
  public Runnable follow(Outlet outlet, long after) {
    Follower follower = new Follower(outlet, after, this::wake);
    followers.add(follower);
    if (closed) {
      follower.close();
    }
    wake();
    return () -> followers.remove(follower);
  }

  private void wake() {
    work.release();
  }

  private void run() {
    try {
      while (!closed) {
        awaitWork();
        feed();
      }
    } catch (InterruptedException interrupted) {
      Thread.currentThread().interrupt();
    }
  }

  /** Waits for something new, and a tick at most while somebody follows. */
  private void awaitWork() throws InterruptedException {
    if (followers.isEmpty()) {
      work.acquire();
    } else if (!work.tryAcquire(TICK_MILLIS, TimeUnit.MILLISECONDS)) {
      return;
    }
    work.drainPermits();
  }

  private void feed() {
    Supplier<List<ProgressAnswer>> progress = once(() -> views.jobs().jobs());
    List<Follower> broken =
        followers.stream().filter(follower -> !fed(follower, progress)).toList();
    broken.forEach(followers::remove);
  }

  /** Feeds one; false when that went wrong, and it is dropped. */
  private boolean fed(Follower follower, Supplier<List<ProgressAnswer>> progress) {
    try {
      follower.feed(desk, progress);
      return true;
    } catch (RuntimeException failure) {
      LOGGER.warn("a follower of the event stream is dropped", failure);
      follower.close();
      return false;
    }
  }

  /** All followers of one round see the same progress, worked out when the first one asks. */
  private static Supplier<List<ProgressAnswer>> once(Supplier<List<ProgressAnswer>> source) {
    return new Supplier<>() {
      private List<ProgressAnswer> known;

      @Override
      public List<ProgressAnswer> get() {
        if (known == null) {
          known = source.get();
        }
        return known;
      }
    };
  }

  /** Ends all connections and the thread. */
  @Override
  public void close() {
    closed = true;
    wake();
    try {
      listening.close();
    } catch (Exception failure) {
      LOGGER.warn("the event stream could not stop listening", failure);
    }
    followers.forEach(Follower::close);
    followers.clear();
  }
}
