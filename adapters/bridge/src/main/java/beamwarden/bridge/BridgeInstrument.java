package beamwarden.bridge;

import beamwarden.beam.Conditions;
import beamwarden.beam.Point;
import beamwarden.instrument.Grant;
import beamwarden.instrument.Instrument;
import beamwarden.instrument.InstrumentListener;
import beamwarden.instrument.StopWhen;
import beamwarden.timing.PacedTime;
import beamwarden.timing.TimeAnchor;
import java.util.Set;

/**
 * An instrument whose adapter is another process, which goes on when this one ends.
 *
 * <p>Each verb becomes a request; the adapter's answer says only that it has arrived, and is all
 * that is timed. Events come in order on one thread of the connection's own. When the connection
 * ends, for whatever reason, the listener hears {@code Lost} once and nothing after it, and {@link
 * #connect} opens another one, when called from the listener itself too. A verb that is called
 * without a connection does nothing: {@code Lost} has been told, or is about to be.
 *
 * <p>Verbs may be called from one thread at a time.
 */
public final class BridgeInstrument implements Instrument {
  private final PeerStarter starter;
  private final Limits limits;
  private final PacedTime real = new PacedTime(TimeAnchor.real(), "bridge-watch");
  private AdapterLink link; // guarded by this
  private Thread thread; // guarded by this
  private boolean closed; // guarded by this

  /** An instrument behind whatever {@code starter} finds or starts. */
  public BridgeInstrument(PeerStarter starter) {
    this(starter, Limits.USUAL);
  }

  BridgeInstrument(PeerStarter starter, Limits limits) {
    this.starter = starter;
    this.limits = limits;
  }

  /**
   * {@inheritDoc}
   *
   * @throws IllegalStateException when it is closed
   */
  @Override
  public synchronized void connect(InstrumentListener listener) {
    if (closed) {
      throw new IllegalStateException("this instrument is closed; open another one");
    }
    if (link != null) {
      link.connectAgain(listener);
      return;
    }
    link = new AdapterLink(starter, listener, real, limits, this::ended);
    thread = new Thread(link, "bridge-events");
    thread.setDaemon(true);
    thread.start();
  }

  private synchronized void ended() {
    link = null;
    if (closed) {
      real.close();
    }
  }

  @Override
  public void seal(long fence, String store, Set<Long> grants, boolean handOver) {
    send(Call.Seal.of(fence, store, grants, handOver));
  }

  @Override
  public void prepare(long request, Conditions conditions, Point stage) {
    send(new Call.Prepare(request, conditions, stage));
  }

  @Override
  public void measure(long request) {
    send(new Call.Measure(request));
  }

  @Override
  public void begin(Grant grant) {
    send(new Call.Begin(grant));
  }

  @Override
  public void stop(StopWhen when) {
    send(new Call.Stop(when));
  }

  @Override
  public void heartbeat(long number) {
    send(new Call.Heartbeat(number));
  }

  @Override
  public void acknowledge(long grant) {
    send(new Call.Acknowledge(grant));
  }

  @Override
  public void windDown() {
    send(new Call.WindDown());
  }

  private void send(Call call) {
    AdapterLink to = current();
    if (to != null) {
      to.send(call);
    }
  }

  private synchronized AdapterLink current() {
    return link;
  }

  /**
   * Tells the adapter to blank the beam and to end, and waits for it, for a bounded time. Without a
   * connection nothing can be told: the adapter blanks when its grant or lease ends.
   */
  @Override
  public void close() {
    AdapterLink last;
    Thread events;
    synchronized (this) {
      if (closed) {
        return;
      }
      closed = true;
      last = link;
      events = thread;
      if (last == null) {
        real.close();
        return;
      }
    }
    if (last.sayBye() && events != Thread.currentThread()) {
      await(events);
      last.end("closed");
    }
  }

  private void await(Thread events) {
    try {
      events.join(limits.bye().toMillis());
    } catch (InterruptedException e) {
      Thread.currentThread().interrupt();
    }
  }
}
