package beamwarden.bridge;

import java.time.Duration;

/**
 * How long a connection waits, in real time, before it counts as lost.
 *
 * @param hello for the first answer of a peer, its own start included
 * @param answer for the answer that a request has arrived; never for what comes of it
 * @param write for the other side to read what was sent
 * @param bye for the answer that the beam is blanked and the adapter ends
 */
record Limits(Duration hello, Duration answer, Duration write, Duration bye) {
  /** The usual ones. */
  static final Limits USUAL =
      new Limits(
          Duration.ofSeconds(30),
          Duration.ofSeconds(10),
          Duration.ofSeconds(10),
          Duration.ofSeconds(10));
}
