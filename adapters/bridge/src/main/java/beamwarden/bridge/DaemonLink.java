package beamwarden.bridge;

import beamwarden.instrument.InstrumentEvent;
import beamwarden.timing.Timeline;
import java.time.Duration;
import java.util.Optional;
import java.util.OptionalInt;
import java.util.OptionalLong;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/** The adapter's side of one connection: greets the daemon, then does what it asks, in order. */
final class DaemonLink {
  private static final Logger LOGGER = LoggerFactory.getLogger(DaemonLink.class);

  private final Host host;
  private final Peer peer;
  private final Timeline real;
  private final Limits limits;
  private final Wire wire;

  DaemonLink(Host host, Peer peer, Timeline real, Limits limits) {
    this.host = host;
    this.peer = peer;
    this.real = real;
    this.limits = limits;
    this.wire = new Wire(peer, real, limits.write());
  }

  /** Talks until the connection ends. */
  void run() {
    wire.start();
    try {
      if (greeted()) {
        LOGGER.atInfo().addKeyValue("daemon", peer.name()).log("a daemon has connected");
        Optional<byte[]> line = wire.next();
        while (line.isPresent() && did(line.get())) {
          line = wire.next();
        }
      }
      awaitEnd();
    } catch (InterruptedException e) {
      Thread.currentThread().interrupt();
      wire.end("interrupted");
    } catch (RuntimeException e) {
      LOGGER.error("a connection failed", e);
      wire.end("the connection failed within the adapter's process");
    }
    host.left(this);
    LOGGER
        .atInfo()
        .addKeyValue("daemon", peer.name())
        .addKeyValue("reason", wire.reason().orElse(""))
        .log("a connection has ended");
  }

  /** Another daemon has the instrument now. */
  void replaced() {
    refuse(
        OptionalLong.empty(), ErrorCode.REPLACED, "another daemon has connected to the instrument");
  }

  /** Ends the connection once all that waits is sent, and waits for that, but not for longer. */
  void finish(String reason, Duration atMost) {
    wire.finish(reason);
    try {
      if (!wire.awaitEnd(atMost)) {
        wire.end(reason);
      }
    } catch (InterruptedException e) {
      Thread.currentThread().interrupt();
      wire.end(reason);
    }
  }

  private boolean greeted() throws InterruptedException {
    Timeline.Waiting watch =
        real.after(limits.answer(), () -> wire.end("no hello came within " + limits.answer()));
    Optional<byte[]> first = wire.next();
    watch.cancel();
    if (first.isEmpty()) {
      return false;
    }
    try {
      Message message = Messages.read(first.get());
      if (message instanceof Message.Request request
          && request.call() instanceof Call.Hello hello) {
        return greeted(request.id(), hello);
      }
      throw new MalformedMessage(ErrorCode.NOT_GREETED, "the first message must be hello");
    } catch (MalformedMessage e) {
      refuse(e);
      return false;
    }
  }

  private boolean greeted(long id, Call.Hello hello) throws MalformedMessage {
    OptionalLong request = OptionalLong.of(id);
    if (!host.knows(hello.token())) {
      throw new MalformedMessage(ErrorCode.NOT_GREETED, request, "the token is wrong");
    }
    if (hello.protocol() != Messages.PROTOCOL) {
      throw new MalformedMessage(
          ErrorCode.OTHER_PROTOCOL,
          request,
          "the adapter speaks protocol " + Messages.PROTOCOL + ", not " + hello.protocol());
    }
    if (!host.admit(this)) {
      throw new MalformedMessage(ErrorCode.ADAPTER_FAILED, request, "the adapter is ending");
    }
    send(new Message.Accepted(id, OptionalInt.of(Messages.PROTOCOL)));
    return true;
  }

  /** Does what a line asks; false when it was the last. */
  private boolean did(byte[] line) {
    try {
      Message message = Messages.read(line);
      if (message instanceof Message.Request request) {
        return did(request);
      }
      throw new MalformedMessage(ErrorCode.NOT_A_MESSAGE, "a daemon sends requests only");
    } catch (MalformedMessage e) {
      refuse(e);
      return false;
    }
  }

  private boolean did(Message.Request request) throws MalformedMessage {
    Call call = request.call();
    try {
      if (call instanceof Call.OfInstrument verb) {
        host.perform(this, verb);
      } else if (call instanceof Call.Connect) {
        host.connect(this, this::tell);
      } else if (call instanceof Call.Bye) {
        host.bye(this);
      } else {
        throw new MalformedMessage(
            ErrorCode.NOT_A_MESSAGE, OptionalLong.of(request.id()), "hello was said already");
      }
    } catch (Host.AdapterFailed e) {
      throw new MalformedMessage(
          ErrorCode.ADAPTER_FAILED,
          OptionalLong.of(request.id()),
          Messages.shortened(e.getMessage()));
    }
    send(new Message.Accepted(request.id(), OptionalInt.empty()));
    if (call instanceof Call.Bye) {
      host.close();
      return false;
    }
    return true;
  }

  private void tell(InstrumentEvent event) {
    send(new Message.Told(event));
    if (event instanceof InstrumentEvent.Lost) {
      wire.finish("the instrument's own connection is lost");
    }
  }

  private void send(Message message) {
    wire.send(Messages.write(message));
  }

  private void refuse(MalformedMessage refused) {
    LOGGER
        .atWarn()
        .addKeyValue("daemon", peer.name())
        .addKeyValue("reason", refused.getMessage())
        .log("ending a connection");
    send(refused.refusal());
    wire.finish(refused.getMessage());
  }

  private void refuse(OptionalLong id, ErrorCode code, String sentence) {
    refuse(new MalformedMessage(code, id, sentence));
  }

  /** Takes and drops whatever still comes, until the connection has ended. */
  private void awaitEnd() throws InterruptedException {
    while (wire.next().isPresent()) {
      LOGGER.debug("dropped a message after the end");
    }
  }
}
