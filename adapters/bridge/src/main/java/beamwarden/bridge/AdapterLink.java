package beamwarden.bridge;

import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.InstrumentListener;
import beamwarden.timing.Timeline;
import java.io.IOException;
import java.time.Duration;
import java.util.HashMap;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalInt;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/**
 * The daemon's side of one connection, from opening it to its end.
 *
 * <p>{@link #run} has a thread of its own and is the only one that tells the listener; {@link
 * #send} may be called from any.
 */
final class AdapterLink implements Runnable {
  private static final Logger LOGGER = LoggerFactory.getLogger(AdapterLink.class);

  private record Pending(Method method, Timeline.Waiting watch) {}

  private final PeerStarter starter;
  private final Timeline real;
  private final Limits limits;
  private final Runnable whenEnded;
  private final Map<Long, Pending> pending = new HashMap<>(); // guarded by itself
  private long lastId; // guarded by pending
  private String lastWords; // on the thread of run() only; set when the conversation is over
  private volatile InstrumentListener listener;
  private volatile Wire wire;
  private volatile boolean greeted;
  private volatile boolean quiet;

  /**
   * A link that {@link #run} will open.
   *
   * @param whenEnded called before the listener hears that the connection is lost
   */
  AdapterLink(
      PeerStarter starter,
      InstrumentListener listener,
      Timeline real,
      Limits limits,
      Runnable whenEnded) {
    this.starter = starter;
    this.listener = listener;
    this.real = real;
    this.limits = limits;
    this.whenEnded = whenEnded;
  }

  /** Opens the connection, tells what comes, and at the end why it ended, once. */
  @Override
  public void run() {
    String reason = lived();
    end(reason);
    forgetPending();
    whenEnded.run();
    if (quiet) {
      LOGGER.debug("let go of the adapter");
      return;
    }
    LOGGER.atWarn().addKeyValue("reason", reason).log("lost the connection to the adapter");
    tell(new InstrumentEvent.Lost(reason));
  }

  /** Asks afresh what instrument there is; from here on another listener hears what comes. */
  void connectAgain(InstrumentListener other) {
    listener = other;
    send(new Call.Connect());
  }

  /** Asks the adapter; without effect before it has answered hello or after the end. */
  void send(Call call) {
    Wire to = wire;
    if (to == null || !greeted || to.reason().isPresent()) {
      LOGGER.atDebug().addKeyValue("method", Method.of(call).text()).log("no connection; not sent");
      return;
    }
    request(to, call);
  }

  /**
   * Asks the adapter to end; from here on the listener hears nothing more.
   *
   * @return false when there is no adapter to ask, and the connection was ended instead
   */
  boolean sayBye() {
    quiet = true;
    Wire to = wire;
    if (to == null || !greeted || to.reason().isPresent()) {
      end("closed");
      return false;
    }
    request(to, new Call.Bye());
    return true;
  }

  /** Ends the connection. */
  void end(String reason) {
    Wire open = wire;
    if (open != null) {
      open.end(reason);
    }
  }

  private String lived() {
    try {
      Peer peer = starter.open();
      Wire opened = new Wire(peer, real, limits.write());
      wire = opened;
      opened.start();
      if (quiet) {
        opened.end("closed while it was opened");
      } else {
        request(opened, new Call.Hello(Messages.PROTOCOL, peer.token()));
      }
      converse(opened);
      // What the adapter said last tells more than that it then went away.
      return Optional.ofNullable(lastWords)
          .or(opened::reason)
          .orElse("the connection to " + peer.name() + " ended");
    } catch (IOException e) {
      return Messages.shortened(String.valueOf(e.getMessage()));
    } catch (RuntimeException e) {
      LOGGER.error("the connection failed", e);
      return "the connection failed within the daemon: " + e.getMessage();
    } catch (InterruptedException e) {
      Thread.currentThread().interrupt();
      return "the connection was interrupted";
    }
  }

  private void converse(Wire opened) throws InterruptedException {
    Optional<byte[]> line = opened.next();
    while (line.isPresent() && lastWords == null) {
      try {
        take(opened, Messages.read(line.get()));
      } catch (MalformedMessage e) {
        lastWords = "the adapter sent what is no message: " + e.getMessage();
      }
      if (lastWords == null) {
        line = opened.next();
      }
    }
    if (lastWords != null) {
      opened.end(lastWords);
    }
  }

  private void take(Wire from, Message message) throws MalformedMessage {
    if (message instanceof Message.Accepted accepted) {
      accepted(from, accepted);
    } else if (message instanceof Message.Refused refused) {
      lastWords = refusal(refused);
    } else if (message instanceof Message.Told told && greeted) {
      told(told.event());
    } else {
      throw new MalformedMessage(
          ErrorCode.NOT_A_MESSAGE, "it is not an adapter's turn to say this: " + message);
    }
  }

  private void told(InstrumentEvent event) {
    if (event instanceof InstrumentEvent.Lost lost) {
      lastWords = Messages.shortened(lost.reason());
    } else if (!quiet) {
      tell(event);
    }
  }

  private void accepted(Wire from, Message.Accepted accepted) throws MalformedMessage {
    Pending asked;
    synchronized (pending) {
      asked = pending.remove(accepted.id());
    }
    if (asked == null) {
      throw new MalformedMessage(
          ErrorCode.NOT_A_MESSAGE,
          "an answer to request " + accepted.id() + ", which waits for none");
    }
    asked.watch().cancel();
    if (asked.method() == Method.HELLO) {
      greet(from, accepted.protocol());
    }
  }

  private void greet(Wire from, OptionalInt protocol) throws MalformedMessage {
    if (protocol.isEmpty() || protocol.getAsInt() != Messages.PROTOCOL) {
      throw new MalformedMessage(
          ErrorCode.OTHER_PROTOCOL,
          "it speaks "
              + (protocol.isPresent() ? "protocol " + protocol.getAsInt() : "no protocol")
              + ", the daemon speaks "
              + Messages.PROTOCOL
              + "; bring both to the same version");
    }
    greeted = true;
    request(from, new Call.Connect());
  }

  private void request(Wire to, Call call) {
    long id;
    Method method = Method.of(call);
    synchronized (pending) {
      id = ++lastId;
      Timeline.Waiting watch = real.after(patience(method), () -> unanswered(to, id));
      pending.put(id, new Pending(method, watch));
    }
    to.send(Messages.write(new Message.Request(id, call)));
  }

  private Duration patience(Method method) {
    return switch (method) {
      case HELLO -> limits.hello();
      case BYE -> limits.bye();
      default -> limits.answer();
    };
  }

  private void unanswered(Wire to, long id) {
    Pending asked;
    synchronized (pending) {
      asked = pending.get(id);
    }
    if (asked != null) {
      to.end(
          "the adapter has not answered "
              + asked.method().text()
              + " within "
              + patience(asked.method()).toMillis() / 1000.0
              + " s");
    }
  }

  private String refusal(Message.Refused refused) {
    Pending asked = null;
    if (refused.id().isPresent()) {
      synchronized (pending) {
        asked = pending.get(refused.id().getAsLong());
      }
    }
    return asked == null
        ? "the adapter ended the connection: " + refused.text()
        : "the adapter refused " + asked.method().text() + ": " + refused.text();
  }

  private void forgetPending() {
    synchronized (pending) {
      pending.values().forEach(asked -> asked.watch().cancel());
      pending.clear();
    }
  }

  private void tell(InstrumentEvent event) {
    try {
      listener.on(event);
    } catch (RuntimeException | Error e) {
      LOGGER.error("the listener failed; the connection is given up", e);
      lastWords = "the daemon failed to take an event";
    }
  }
}
