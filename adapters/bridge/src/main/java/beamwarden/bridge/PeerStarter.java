package beamwarden.bridge;

import java.io.IOException;

/** Finds an adapter that runs, or starts it, and connects to it. */
@FunctionalInterface
public interface PeerStarter {
  /**
   * Makes a new connection; may wait, for a bounded time.
   *
   * @throws IOException when there is none, with one sentence for a person
   */
  Peer open() throws IOException;
}
