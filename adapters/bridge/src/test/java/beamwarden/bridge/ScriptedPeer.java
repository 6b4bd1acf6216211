package beamwarden.bridge;

import static java.nio.charset.StandardCharsets.UTF_8;
import static org.junit.jupiter.api.Assertions.assertEquals;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStreamReader;
import java.net.InetAddress;
import java.net.ServerSocket;
import java.net.Socket;
import java.net.SocketException;
import java.util.Optional;

/** The other end of a connection by the plainest means: it reads and writes raw lines. */
final class ScriptedPeer implements AutoCloseable {
  private static final int PATIENCE_MILLIS = 10_000;
  private static final String ACCEPTED =
      "{\"jsonrpc\":\"2.0\",\"id\":%d,\"result\":{\"accepted\":true}}";

  private final Socket socket;
  private final BufferedReader lines;

  private ScriptedPeer(Socket socket) throws IOException {
    this.socket = socket;
    socket.setSoTimeout(PATIENCE_MILLIS);
    lines = new BufferedReader(new InputStreamReader(socket.getInputStream(), UTF_8));
  }

  /** A place where a daemon can connect. */
  static ServerSocket port() throws IOException {
    ServerSocket port = new ServerSocket(0, 5, InetAddress.getLoopbackAddress());
    port.setSoTimeout(PATIENCE_MILLIS);
    return port;
  }

  /** Plays the adapter: takes the next daemon that connects. */
  static ScriptedPeer accept(ServerSocket port) throws IOException {
    return new ScriptedPeer(port.accept());
  }

  /** Plays the daemon: connects to an adapter. */
  static ScriptedPeer connect(int port) throws IOException {
    return new ScriptedPeer(new Socket(InetAddress.getLoopbackAddress(), port));
  }

  /** Reads a line, which must be this one. */
  void hears(String line) throws IOException {
    assertEquals(line, lines.readLine());
  }

  /** Reads the next line; empty at the end. */
  Optional<String> hears() throws IOException {
    try {
      return Optional.ofNullable(lines.readLine());
    } catch (SocketException e) {
      return Optional.empty();
    }
  }

  /** Writes a line. */
  void says(String line) throws IOException {
    writes(line + "\n");
  }

  void accepts(long id) throws IOException {
    says(ACCEPTED.formatted(id));
  }

  /** Writes part of a line. */
  void writes(String text) throws IOException {
    socket.getOutputStream().write(text.getBytes(UTF_8));
    socket.getOutputStream().flush();
  }

  /** Does what every adapter does first. */
  void greets() throws IOException {
    hears(
        "{\"jsonrpc\":\"2.0\",\"id\":1,\"method\":\"hello\",\"params\":{\"protocol\":1,\"token\":\"open\"}}");
    says("{\"jsonrpc\":\"2.0\",\"id\":1,\"result\":{\"accepted\":true,\"protocol\":1}}");
    hears("{\"jsonrpc\":\"2.0\",\"id\":2,\"method\":\"connect\"}");
    accepts(2);
  }

  /** Goes away without a word. */
  void leaves() throws IOException {
    socket.close();
  }

  @Override
  public void close() throws IOException {
    socket.close();
  }
}
