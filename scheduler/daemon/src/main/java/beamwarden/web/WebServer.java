package beamwarden.web;

import beamwarden.answer.DaemonAnswer;
import beamwarden.run.Desk;
import beamwarden.web.api.Api;
import beamwarden.web.api.Refusal;
import beamwarden.web.api.RefusalKind;
import beamwarden.web.stream.Pump;
import io.undertow.Undertow;
import io.undertow.UndertowOptions;
import io.undertow.server.HttpHandler;
import io.undertow.server.HttpServerExchange;
import io.undertow.server.handlers.GracefulShutdownHandler;
import java.net.InetSocketAddress;
import java.net.URI;
import java.time.Duration;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/** The daemon's web server, on loopback. Started and closed by one thread. */
public final class WebServer implements AutoCloseable {
  private static final Logger LOGGER = LoggerFactory.getLogger(WebServer.class);

  private static final String LOOPBACK = "127.0.0.1";
  private static final int IO_THREADS = 2;
  private static final int WORKER_THREADS = 8;
  private static final int HEADER_BYTES_MAX = 16 * 1024;
  private static final int HEADERS_MAX = 64;
  private static final int PARAMETERS_MAX = 32;
  private static final int PARSING_MILLIS_MAX = 10_000;
  private static final int NEXT_REQUEST_MILLIS_MAX = 60_000;

  /** Longer than the event stream's comments are apart. */
  private static final int IDLE_MILLIS_MAX = 60_000;

  /** What is left of a body that was too large is read and thrown away up to here. */
  private static final long DRAINED_BYTES_MAX = 64L * 1024 * 1024;

  private static final Duration PATIENCE = Duration.ofSeconds(20);
  private static final long STOPPING_MILLIS_MAX = 5_000;

  private final Pump pump;
  private final GracefulShutdownHandler gate;
  private final Undertow server;
  private final int wishedPort;

  /**
   * A server in front of a run; {@link #start} opens its port.
   *
   * @param desk where the run is asked
   * @param settings the rest
   */
  public WebServer(Desk desk, WebSettings settings) {
    this(desk, settings, PATIENCE);
  }

  WebServer(Desk desk, WebSettings settings, Duration patience) {
    wishedPort = settings.port();
    pump = new Pump(desk);
    ApiHandler api = new ApiHandler(new Api(desk, facts(settings), patience));
    StreamHandler stream = new StreamHandler(desk, pump);
    HttpHandler routes =
        exchange ->
            (exchange.getRequestPath().equals(Api.EVENTS) ? stream : (HttpHandler) api)
                .handleRequest(exchange);
    gate = new GracefulShutdownHandler(new AccessHandler(new Token(settings.token()), routes));
    server =
        Undertow.builder()
            .addHttpListener(wishedPort, LOOPBACK)
            .setIoThreads(IO_THREADS)
            .setWorkerThreads(WORKER_THREADS)
            .setServerOption(UndertowOptions.MAX_HEADER_SIZE, HEADER_BYTES_MAX)
            .setServerOption(UndertowOptions.MAX_HEADERS, HEADERS_MAX)
            .setServerOption(UndertowOptions.MAX_PARAMETERS, PARAMETERS_MAX)
            .setServerOption(UndertowOptions.MAX_ENTITY_SIZE, DRAINED_BYTES_MAX)
            .setServerOption(UndertowOptions.REQUEST_PARSE_TIMEOUT, PARSING_MILLIS_MAX)
            .setServerOption(UndertowOptions.NO_REQUEST_TIMEOUT, NEXT_REQUEST_MILLIS_MAX)
            .setServerOption(UndertowOptions.IDLE_TIMEOUT, IDLE_MILLIS_MAX)
            .setHandler(this::whileOpen)
            .build();
  }

  private static DaemonAnswer facts(WebSettings settings) {
    return new DaemonAnswer(settings.store().toAbsolutePath().toString(), settings.profileHash());
  }

  /** Requests that come while it closes are refused like any other. */
  private void whileOpen(HttpServerExchange exchange) throws Exception {
    exchange.addDefaultResponseListener(
        ended -> {
          if (ended.getStatusCode() != RefusalKind.UNAVAILABLE.status()) {
            return false;
          }
          Replies.refuse(
              ended, Refusal.of(RefusalKind.UNAVAILABLE, "the daemon is closing; ask it later"));
          return true;
        });
    gate.handleRequest(exchange);
  }

  /**
   * Opens the port and answers from then on.
   *
   * @return the address
   * @throws WebException when the port cannot be had
   */
  public URI start() {
    try {
      server.start();
    } catch (RuntimeException failure) {
      pump.close();
      throw new WebException(
          "port "
              + wishedPort
              + " on "
              + LOOPBACK
              + " cannot be had; choose another one with --port",
          failure);
    }
    int port = ((InetSocketAddress) server.getListenerInfo().get(0).getAddress()).getPort();
    return URI.create("http://" + LOOPBACK + ":" + port);
  }

  /** Takes no more requests, lets those under way finish, ends the event streams, closes. */
  @Override
  public void close() {
    gate.shutdown();
    pump.close();
    try {
      if (!gate.awaitShutdown(STOPPING_MILLIS_MAX)) {
        LOGGER.warn("requests were still under way after {} ms", STOPPING_MILLIS_MAX);
      }
    } catch (InterruptedException interrupted) {
      Thread.currentThread().interrupt();
    }
    server.stop();
  }
}
