package beamwarden.bridge;

import java.io.IOException;
import java.net.InetAddress;
import java.util.Optional;

/** An adapter that somebody else has started, at a port of this machine that does not change. */
public final class FixedAddress implements PeerStarter {
  private final String host;
  private final int port;
  private final Optional<String> token;

  /**
   * An adapter at a port.
   *
   * @param host a loopback address, because the messages are not encrypted
   * @param port its port
   * @param token what it wants to be shown
   */
  public FixedAddress(String host, int port, Optional<String> token) {
    this.host = host;
    this.port = port;
    this.token = token;
  }

  @Override
  public Peer open() throws IOException {
    InetAddress address = InetAddress.getByName(host);
    if (!address.isLoopbackAddress()) {
      throw new IOException(
          host + " is not this machine; an adapter is spoken to on a loopback address only");
    }
    return Peer.at(address, port, token);
  }
}
