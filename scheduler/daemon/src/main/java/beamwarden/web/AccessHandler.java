package beamwarden.web;

import beamwarden.web.api.Refusal;
import beamwarden.web.api.RefusalKind;
import io.undertow.server.HttpHandler;
import io.undertow.server.HttpServerExchange;
import io.undertow.util.Headers;
import java.net.InetSocketAddress;
import java.util.Locale;
import java.util.Set;

/**
 * Lets through who may ask: by a name of loopback, from no page of another site, and for changes
 * with the token.
 *
 * <p>A page of another site could reach loopback through a name of its own that resolves there; it
 * would be that name that Host carries.
 */
final class AccessHandler implements HttpHandler {
  private static final Set<String> NAMES = Set.of("127.0.0.1", "localhost", "[::1]");
  private static final Set<String> READING = Set.of("GET", "HEAD");
  private static final int USUAL_PORT = 80;

  private final Token token;
  private final HttpHandler next;

  AccessHandler(Token token, HttpHandler next) {
    this.token = token;
    this.next = next;
  }

  @Override
  public void handleRequest(HttpServerExchange exchange) throws Exception {
    try {
      check(exchange);
    } catch (Refusal refusal) {
      Replies.refuse(exchange, refusal);
      return;
    }
    next.handleRequest(exchange);
  }

  private void check(HttpServerExchange exchange) {
    String host = exchange.getRequestHeaders().getFirst(Headers.HOST);
    if (host == null || !ours(host, port(exchange))) {
      throw Refusal.of(
          RefusalKind.WRONG_HOST,
          "the header Host must be localhost:" + port(exchange) + " or 127.0.0.1 with that port");
    }
    String origin = exchange.getRequestHeaders().getFirst(Headers.ORIGIN);
    if (origin != null && !origin.equalsIgnoreCase("http://" + host)) {
      throw Refusal.of(
          RefusalKind.FOREIGN_ORIGIN,
          "a page of another origin asks; only http://" + host + " may");
    }
    boolean change = !READING.contains(exchange.getRequestMethod().toString());
    String shown = exchange.getRequestHeaders().getFirst(Headers.AUTHORIZATION);
    if (change && !token.shownIn(shown)) {
      throw Refusal.of(
              RefusalKind.TOKEN_NEEDED,
              "a change needs the header Authorization: Bearer with the token in the store's folder")
          .with("WWW-Authenticate", "Bearer");
    }
  }

  private static boolean ours(String host, int port) {
    String lower = host.toLowerCase(Locale.ROOT);
    return NAMES.stream()
        .anyMatch(
            name -> lower.equals(name + ":" + port) || (port == USUAL_PORT && lower.equals(name)));
  }

  private static int port(HttpServerExchange exchange) {
    return ((InetSocketAddress) exchange.getConnection().getLocalAddress()).getPort();
  }
}
