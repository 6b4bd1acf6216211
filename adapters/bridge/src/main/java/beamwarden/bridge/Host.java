package beamwarden.bridge;

import beamwarden.instrument.Instrument;
import beamwarden.instrument.InstrumentListener;
import beamwarden.timing.Timeline;
import java.nio.charset.StandardCharsets;
import java.security.MessageDigest;
import java.time.Duration;
import java.util.Optional;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.CountDownLatch;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.TimeUnit;
import java.util.concurrent.TimeoutException;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/**
 * Offers an instrument of this process to one daemon at a time.
 *
 * <p>The newest daemon that has shown the token has the instrument; the one before it is cut off.
 * Whether it may expose is decided by the fence, not here. The end of a connection changes nothing
 * at the instrument: exposures go on until their grant or lease ends, and what happens while nobody
 * listens is not kept, since a seal tells it later.
 *
 * <p>Every verb is called on the adapter's own line of time, so that an adapter whose tasks run
 * there is never entered by two threads. Safe for use by several threads.
 */
final class Host implements AutoCloseable {
  private static final Logger LOGGER = LoggerFactory.getLogger(Host.class);

  private final Instrument instrument;
  private final Timeline time;
  private final Timeline real;
  private final Settings settings;
  private final CountDownLatch over = new CountDownLatch(1);
  private DaemonLink current; // guarded by this
  private Timeline.Waiting idle; // guarded by this
  private boolean ended; // guarded by this
  private boolean closed; // only on the line of time

  /**
   * How a host behaves.
   *
   * @param token what a daemon must show; empty where nobody else can connect
   * @param idle how long, in real time, it stays without any connection
   * @param limits how long a connection waits
   */
  record Settings(Optional<String> token, Duration idle, Limits limits) {}

  Host(Instrument instrument, Timeline time, Timeline real, Settings settings) {
    this.instrument = instrument;
    this.time = time;
    this.real = real;
    this.settings = settings;
    waitForDaemon();
  }

  /** Talks to whoever has connected, on the calling thread, until the connection ends. */
  void serve(Peer peer) {
    new DaemonLink(this, peer, real, settings.limits()).run();
  }

  /** Whether a token is the right one. */
  boolean knows(Optional<String> token) {
    byte[] right = settings.token().orElse("").getBytes(StandardCharsets.UTF_8);
    byte[] shown = token.orElse("").getBytes(StandardCharsets.UTF_8);
    return MessageDigest.isEqual(right, shown);
  }

  /** Makes a greeted daemon the one that has the instrument; false when the host is ending. */
  synchronized boolean admit(DaemonLink link) {
    if (ended) {
      return false;
    }
    if (current != null) {
      current.replaced();
    }
    current = link;
    idle.cancel();
    return true;
  }

  /** A daemon is gone. */
  synchronized void left(DaemonLink link) {
    if (current == link) {
      current = null;
      if (!ended) {
        waitForDaemon();
      }
    }
  }

  /** Calls a verb for a daemon, unless another one has the instrument by now. */
  void perform(DaemonLink link, Call.OfInstrument call) throws AdapterFailed {
    onLineOfTime(() -> call.applyTo(instrument), link);
  }

  /** Makes a daemon the one that hears of events. */
  void connect(DaemonLink link, InstrumentListener listener) throws AdapterFailed {
    onLineOfTime(() -> instrument.connect(listener), link);
  }

  /** Closes the instrument for a daemon that has it. */
  void bye(DaemonLink link) throws AdapterFailed {
    if (!has(link)) {
      throw new AdapterFailed("another daemon has the instrument");
    }
    letGo();
  }

  /** Waits until the host is over. */
  void awaitOver() throws InterruptedException {
    over.await();
  }

  /** Blanks the beam, lets go of the instrument and of the daemon; the host is over then. */
  @Override
  public void close() {
    if (over.getCount() == 0) {
      return;
    }
    DaemonLink last;
    synchronized (this) {
      ended = true;
      idle.cancel();
      last = current;
    }
    try {
      letGo();
    } catch (AdapterFailed e) {
      LOGGER.error("the instrument was not let go of in order: {}", e.getMessage());
    }
    if (last != null) {
      last.finish("the adapter has ended", settings.limits().write());
    }
    over.countDown();
  }

  private void letGo() throws AdapterFailed {
    onLineOfTime(
        () -> {
          if (!closed) {
            closed = true;
            instrument.close();
          }
        },
        null);
  }

  private void onLineOfTime(Runnable work, DaemonLink onlyFor) throws AdapterFailed {
    CompletableFuture<Void> done = new CompletableFuture<>();
    time.after(
        Duration.ZERO,
        () -> {
          try {
            if (onlyFor == null || has(onlyFor)) {
              work.run();
            }
            done.complete(null);
          } catch (RuntimeException | Error e) {
            done.completeExceptionally(e);
          }
        });
    await(done);
  }

  private void await(CompletableFuture<Void> done) throws AdapterFailed {
    try {
      done.get(settings.limits().answer().toMillis(), TimeUnit.MILLISECONDS);
    } catch (ExecutionException e) {
      LOGGER.error("the adapter failed", e.getCause());
      throw new AdapterFailed("the adapter failed: " + e.getCause().getMessage());
    } catch (TimeoutException e) {
      throw new AdapterFailed("the adapter did not take the request in time");
    } catch (InterruptedException e) {
      Thread.currentThread().interrupt();
      throw new AdapterFailed("the adapter is ending");
    }
  }

  private synchronized boolean has(DaemonLink link) {
    return current == link;
  }

  private void waitForDaemon() {
    idle = real.after(settings.idle(), this::endIdle);
  }

  private void endIdle() {
    synchronized (this) {
      if (current != null || ended) {
        return;
      }
      ended = true;
    }
    LOGGER.atInfo().addKeyValue("waited", settings.idle()).log("no daemon came; the adapter ends");
    close();
  }

  /** A verb could not be called, or failed. */
  static final class AdapterFailed extends Exception {
    AdapterFailed(String sentence) {
      super(sentence);
    }
  }
}
