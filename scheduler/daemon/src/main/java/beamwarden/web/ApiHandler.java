package beamwarden.web;

import beamwarden.web.api.Api;
import beamwarden.web.api.Body;
import beamwarden.web.api.Refusal;
import beamwarden.web.api.RefusalKind;
import beamwarden.web.api.Reply;
import beamwarden.web.api.Request;
import io.undertow.server.HttpHandler;
import io.undertow.server.HttpServerExchange;
import io.undertow.util.Headers;
import java.io.IOException;
import java.io.InputStream;
import java.util.Deque;
import java.util.HashMap;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.Semaphore;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/** Reads requests, has them answered on a worker thread, and writes the replies. */
final class ApiHandler implements HttpHandler {
  private static final Logger LOGGER = LoggerFactory.getLogger(ApiHandler.class);

  /** How many requests may be under way or wait for a worker. */
  private static final int UNDERWAY_MAX = 64;

  private final Api api;
  private final Semaphore room = new Semaphore(UNDERWAY_MAX);

  ApiHandler(Api api) {
    this.api = api;
  }

  @Override
  public void handleRequest(HttpServerExchange exchange) {
    if (!room.tryAcquire()) {
      Replies.refuse(
          exchange,
          Refusal.of(RefusalKind.UNAVAILABLE, "too many requests are under way; ask again shortly")
              .with("Retry-After", "1"));
      return;
    }
    exchange.addExchangeCompleteListener(
        (done, then) -> {
          room.release();
          then.proceed();
        });
    exchange.dispatch(this::work);
  }

  private void work(HttpServerExchange exchange) {
    try {
      exchange.startBlocking();
      Replies.write(exchange, api.answer(request(exchange)));
    } catch (Refusal refusal) {
      Replies.refuse(exchange, refusal);
    } catch (IOException gone) {
      LOGGER.debug("a request's body could not be read", gone);
      exchange.endExchange();
    } catch (RuntimeException broken) {
      LOGGER.error("a request could not be answered: {}", exchange.getRequestPath(), broken);
      Refusal refusal =
          Refusal.of(RefusalKind.BROKEN, "the daemon could not answer; its log says more");
      Reply reply = refusal.reply(exchange.getRequestPath());
      Replies.write(exchange, reply);
    }
  }

  private static Request request(HttpServerExchange exchange) throws IOException {
    return new Request(
        exchange.getRequestMethod().toString(),
        exchange.getRequestPath(),
        query(exchange),
        contentType(exchange),
        wantsText(exchange),
        body(exchange));
  }

  private static Map<String, String> query(HttpServerExchange exchange) {
    Map<String, String> query = new HashMap<>();
    for (Map.Entry<String, Deque<String>> one : exchange.getQueryParameters().entrySet()) {
      query.put(one.getKey(), one.getValue().getFirst());
    }
    return query;
  }

  private static Optional<String> contentType(HttpServerExchange exchange) {
    return Optional.ofNullable(exchange.getRequestHeaders().getFirst(Headers.CONTENT_TYPE))
        .map(type -> type.indexOf(';') < 0 ? type : type.substring(0, type.indexOf(';')))
        .map(type -> type.strip().toLowerCase(Locale.ROOT));
  }

  /** Text is for those who ask for it; everybody else gets JSON. */
  private static boolean wantsText(HttpServerExchange exchange) {
    String accept = exchange.getRequestHeaders().getFirst(Headers.ACCEPT);
    return accept != null && accept.contains("text/plain") && !accept.contains("json");
  }

  /** Reads one byte more than allowed, so that a body that is too large is answered in order. */
  private static Body body(HttpServerExchange exchange) throws IOException {
    if (exchange.getRequestContentLength() > Api.BODY_BYTES_MAX) {
      throw tooLarge(exchange);
    }
    InputStream in = exchange.getInputStream();
    byte[] bytes = in.readNBytes(Api.BODY_BYTES_MAX + 1);
    if (bytes.length > Api.BODY_BYTES_MAX) {
      throw tooLarge(exchange);
    }
    return bytes.length == 0 ? Body.NONE : new Body(bytes);
  }

  private static Refusal tooLarge(HttpServerExchange exchange) {
    exchange.setPersistent(false);
    return Refusal.of(
        RefusalKind.TOO_LARGE,
        "the body has more than "
            + Api.BODY_BYTES_MAX
            + " bytes, the most that is read; share its jobs out to several queues");
  }
}
