package beamwarden.bridge;

import java.io.IOException;
import java.net.InetAddress;
import java.net.InetSocketAddress;
import java.net.ServerSocket;
import java.net.Socket;
import java.security.SecureRandom;
import java.util.HexFormat;
import java.util.Optional;
import java.util.concurrent.Semaphore;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/** The port of a host: listens on loopback alone, with a token of its own. */
final class HostPort implements AutoCloseable {
  private static final Logger LOGGER = LoggerFactory.getLogger(HostPort.class);
  private static final byte[] LOOPBACK = {127, 0, 0, 1};
  private static final long MILLIS_AFTER_FAILURE = 100;
  private static final int TOKEN_BYTES = 32;

  /** How many may be connected at once: one daemon, one that replaces it, and some strangers. */
  private static final int MOST_CONNECTIONS = 16;

  private final ServerSocket socket;
  private final String token;
  private final Semaphore places = new Semaphore(MOST_CONNECTIONS);

  private HostPort(ServerSocket socket, String token) {
    this.socket = socket;
    this.token = token;
  }

  static HostPort open() throws IOException {
    byte[] secret = new byte[TOKEN_BYTES];
    new SecureRandom().nextBytes(secret);
    ServerSocket socket = new ServerSocket();
    socket.bind(new InetSocketAddress(InetAddress.getByAddress(LOOPBACK), 0));
    return new HostPort(socket, HexFormat.of().formatHex(secret));
  }

  String token() {
    return token;
  }

  Address address() {
    return new Address(
        socket.getInetAddress().getHostAddress(),
        socket.getLocalPort(),
        token,
        ProcessHandle.current().pid());
  }

  /** Lets daemons talk to the host, on threads of their own, until this port is closed. */
  void serve(Host host) {
    thread("host-accept", () -> acceptAll(host));
  }

  private void acceptAll(Host host) {
    while (!socket.isClosed()) {
      try {
        accept(host, socket.accept());
      } catch (IOException e) {
        if (!socket.isClosed()) {
          LOGGER.atWarn().addKeyValue("reason", e.getMessage()).log("a connection failed");
          pause();
        }
      }
    }
  }

  /** Whatever made it fail, too many open files for example, is not mended by trying at once. */
  private static void pause() {
    try {
      Thread.sleep(MILLIS_AFTER_FAILURE);
    } catch (InterruptedException e) {
      Thread.currentThread().interrupt();
    }
  }

  private void accept(Host host, Socket connection) throws IOException {
    if (!places.tryAcquire()) {
      LOGGER.warn("too many connections; turning one away");
      connection.close();
      return;
    }
    Peer peer = Peer.over(connection, Optional.empty());
    thread(
        "host-connection",
        () -> {
          try {
            host.serve(peer);
          } finally {
            places.release();
          }
        });
  }

  private static void thread(String name, Runnable work) {
    Thread thread = new Thread(work, name);
    thread.setDaemon(true);
    thread.start();
  }

  @Override
  public void close() throws IOException {
    socket.close();
  }
}
