package beamwarden.bridge;

import java.io.IOException;
import java.io.InputStream;
import java.io.OutputStream;
import java.net.InetAddress;
import java.net.InetSocketAddress;
import java.net.Socket;
import java.util.Optional;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/**
 * The other end of a connection that was just made.
 *
 * @param name how log lines and reasons call it, for example {@code 127.0.0.1:40123}
 * @param from what it sends
 * @param to what is sent to it
 * @param token proves to it that this side may drive the instrument; empty where nobody else can
 *     have made the connection
 * @param letGo ends the connection; called once, must not block
 */
public record Peer(
    String name, InputStream from, OutputStream to, Optional<String> token, Runnable letGo) {
  private static final Logger LOGGER = LoggerFactory.getLogger(Peer.class);
  private static final int CONNECT_WITHIN_MILLIS = 2000;

  /** Connects to a port of this machine. */
  static Peer at(InetAddress host, int port, Optional<String> token) throws IOException {
    Socket socket = new Socket();
    try {
      socket.connect(new InetSocketAddress(host, port), CONNECT_WITHIN_MILLIS);
      return over(socket, token);
    } catch (IOException e) {
      closed(socket);
      throw new IOException(
          "no adapter answers at " + host.getHostAddress() + ":" + port + ": " + e.getMessage(), e);
    }
  }

  /** The other end of a socket. */
  static Peer over(Socket socket, Optional<String> token) throws IOException {
    socket.setTcpNoDelay(true);
    String name = socket.getInetAddress().getHostAddress() + ":" + socket.getPort();
    return new Peer(
        name, socket.getInputStream(), socket.getOutputStream(), token, () -> closed(socket));
  }

  private static void closed(Socket socket) {
    try {
      socket.close();
    } catch (IOException e) {
      LOGGER.atDebug().addKeyValue("reason", e.getMessage()).log("a socket did not close");
    }
  }
}
