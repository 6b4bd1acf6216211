package beamwarden.web;

import beamwarden.web.api.Refusal;
import beamwarden.web.api.Reply;
import io.undertow.server.HttpServerExchange;
import io.undertow.util.Headers;
import io.undertow.util.HttpString;
import java.nio.charset.StandardCharsets;

/** Writes replies out. */
final class Replies {
  private static final HttpString SNIFFING = new HttpString("X-Content-Type-Options");

  private Replies() {}

  static void refuse(HttpServerExchange exchange, Refusal refusal) {
    write(exchange, refusal.reply(exchange.getRequestPath()));
  }

  static void write(HttpServerExchange exchange, Reply reply) {
    exchange.setStatusCode(reply.status());
    exchange.getResponseHeaders().put(Headers.CONTENT_TYPE, reply.contentType());
    exchange.getResponseHeaders().put(Headers.CACHE_CONTROL, "no-store");
    exchange.getResponseHeaders().put(SNIFFING, "nosniff");
    reply
        .headers()
        .forEach((name, value) -> exchange.getResponseHeaders().put(new HttpString(name), value));
    exchange.getResponseSender().send(reply.body(), StandardCharsets.UTF_8);
  }
}
