package beamwarden.web;

import java.nio.file.Path;

/**
 * What a web server is given besides its run.
 *
 * @param port the port on loopback; 0 for any that is free
 * @param token what every change must show
 * @param profileHash the hash of the profile's document, noted with every queue
 * @param store the store's folder, so that whoever may read its token finds it
 */
public record WebSettings(int port, String token, String profileHash, Path store) {
  private static final int PORT_MAX = 65_535;

  /** Refuses a port that cannot be, and a token that anybody could guess. */
  public WebSettings {
    if (port < 0 || port > PORT_MAX) {
      throw new IllegalArgumentException("a port is from 0 to 65535, not " + port);
    }
    if (token.isBlank()) {
      throw new IllegalArgumentException("a token must not be empty");
    }
  }

  /** Names no token. */
  @Override
  public String toString() {
    return "WebSettings[port="
        + port
        + ", token=***, profileHash="
        + profileHash
        + ", store="
        + store
        + "]";
  }
}
