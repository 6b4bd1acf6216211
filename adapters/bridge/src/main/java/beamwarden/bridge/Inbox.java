package beamwarden.bridge;

import java.util.ArrayDeque;
import java.util.Optional;
import java.util.Queue;

/**
 * Lines that have arrived and were not yet taken: a few, then whoever brings more must wait.
 *
 * <p>Apart from the stream so that the end of a connection reaches whoever takes lines even when
 * the stream itself cannot be woken, as with the pipe of a process whose child still holds it.
 */
final class Inbox {
  private static final int MOST_LINES = 4;

  private final Queue<byte[]> lines = new ArrayDeque<>();
  private boolean ended;

  /** Adds a line; false when the connection has ended and the line is of no use. */
  synchronized boolean put(byte[] line) throws InterruptedException {
    while (lines.size() >= MOST_LINES && !ended) {
      wait();
    }
    if (!ended) {
      lines.add(line);
      notifyAll();
    }
    return !ended;
  }

  /** Takes the next line; empty when the connection has ended and all that came was taken. */
  synchronized Optional<byte[]> take() throws InterruptedException {
    while (lines.isEmpty() && !ended) {
      wait();
    }
    Optional<byte[]> line = Optional.ofNullable(lines.poll());
    notifyAll();
    return line;
  }

  synchronized void end() {
    ended = true;
    notifyAll();
  }
}
