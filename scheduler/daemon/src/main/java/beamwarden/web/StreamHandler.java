package beamwarden.web;

import beamwarden.run.Desk;
import beamwarden.web.api.Refusal;
import beamwarden.web.api.RefusalKind;
import beamwarden.web.stream.Message;
import beamwarden.web.stream.Outlet;
import beamwarden.web.stream.Pump;
import io.undertow.Handlers;
import io.undertow.server.HttpHandler;
import io.undertow.server.HttpServerExchange;
import io.undertow.server.handlers.sse.ServerSentEventConnection;
import io.undertow.util.Headers;
import io.undertow.util.HttpString;
import java.io.IOException;
import java.util.Deque;
import java.util.Optional;

/**
 * The connections of the event stream.
 *
 * <p>A client that names no entry is told all of them; one that names the last it has, in the
 * header {@code Last-Event-ID} or as {@code ?after=}, those that came after it.
 */
final class StreamHandler implements HttpHandler {
  private static final HttpString LAST_EVENT_ID = new HttpString("Last-Event-ID");

  /** A comment is sent this often when nothing else is, so that dead clients are noticed. */
  private static final long KEEP_ALIVE_MILLIS = 15_000;

  private static final long RETRY_MILLIS = 1_000;

  private final Desk desk;
  private final Pump pump;
  private final HttpHandler connections;

  StreamHandler(Desk desk, Pump pump) {
    this.desk = desk;
    this.pump = pump;
    this.connections =
        Handlers.serverSentEvents(
            (connection, lastEventId) -> connect(connection, after(connection)));
  }

  @Override
  public void handleRequest(HttpServerExchange exchange) throws Exception {
    try {
      check(exchange);
    } catch (Refusal refusal) {
      Replies.refuse(exchange, refusal);
      return;
    }
    exchange.getResponseHeaders().put(Headers.CACHE_CONTROL, "no-store");
    connections.handleRequest(exchange);
  }

  private void check(HttpServerExchange exchange) {
    if (!exchange.getRequestMethod().toString().equals("GET")) {
      throw Refusal.of(RefusalKind.METHOD_NOT_ALLOWED, "the event stream takes GET only")
          .with("Allow", "GET");
    }
    String id = lastEntry(exchange).orElse("0");
    long last = desk.state().books().entries();
    long after = number(id);
    if (after < 0) {
      throw Refusal.of(
          RefusalKind.MALFORMED, id + " is no number of an entry; send the id of an earlier event");
    }
    if (after > last) {
      throw Refusal.of(
          RefusalKind.REFUSED,
          "the books have "
              + last
              + " entries, and entry "
              + after
              + " was named: this is another store, or an older copy; begin without Last-Event-ID");
    }
    if (!pump.hasRoom()) {
      throw Refusal.of(RefusalKind.UNAVAILABLE, "too many follow the event stream already")
          .with("Retry-After", "10");
    }
  }

  private static Optional<String> lastEntry(HttpServerExchange exchange) {
    Optional<String> asked =
        Optional.ofNullable(exchange.getQueryParameters().get("after")).map(Deque::getFirst);
    return Optional.ofNullable(exchange.getRequestHeaders().getFirst(LAST_EVENT_ID))
        .or(() -> asked);
  }

  /** The number, or -1 when it is none. */
  private static long number(String text) {
    try {
      return Math.max(-1, Long.parseLong(text.strip()));
    } catch (NumberFormatException none) {
      return -1;
    }
  }

  private static long after(ServerSentEventConnection connection) {
    String header = connection.getRequestHeaders().getFirst(LAST_EVENT_ID);
    Deque<String> asked = connection.getQueryParameters().get("after");
    if (header != null) {
      return number(header);
    }
    return asked == null ? 0 : number(asked.getFirst());
  }

  private void connect(ServerSentEventConnection connection, long after) {
    connection.setKeepAliveTime(KEEP_ALIVE_MILLIS);
    connection.sendRetry(RETRY_MILLIS);
    Runnable gone = pump.follow(new Connection(connection), after);
    connection.addCloseTask(closed -> gone.run());
  }

  /** One connection. */
  private record Connection(ServerSentEventConnection connection) implements Outlet {
    @Override
    public void send(Message message, Runnable sent) {
      String id = message.id().isPresent() ? Long.toString(message.id().getAsLong()) : null;
      connection.send(message.data(), message.event(), id, new Sent(sent));
    }

    @Override
    public void close() {
      connection.shutdown();
    }
  }

  /** Tells when a message is on its way; a connection that failed closes by itself. */
  private record Sent(Runnable then) implements ServerSentEventConnection.EventCallback {
    @Override
    public void done(ServerSentEventConnection connection, String data, String event, String id) {
      then.run();
    }

    @Override
    public void failed(
        ServerSentEventConnection connection,
        String data,
        String event,
        String id,
        IOException failure) {
      connection.shutdown();
    }
  }
}
