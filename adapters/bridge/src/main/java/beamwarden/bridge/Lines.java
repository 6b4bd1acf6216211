package beamwarden.bridge;

import java.io.ByteArrayOutputStream;
import java.io.EOFException;
import java.io.IOException;
import java.io.InputStream;
import java.util.Optional;

/** Cuts a stream of bytes into lines of a bounded length. For one thread. */
final class Lines {
  private static final int BUFFER_BYTES = 16 * 1024;

  private final InputStream from;
  private final int longest;
  private final byte[] buffer = new byte[BUFFER_BYTES];
  private int next;
  private int filled;

  Lines(InputStream from, int longest) {
    this.from = from;
    this.longest = longest;
  }

  /**
   * The next line without its end, or empty at the end of the stream.
   *
   * @throws IOException when it cannot be read, is too long, or is cut off
   */
  Optional<byte[]> next() throws IOException {
    ByteArrayOutputStream line = new ByteArrayOutputStream();
    while (next < filled || fill()) {
      int end = lineEnd();
      if (line.size() + (end - next) > longest) {
        throw new IOException("a message is longer than " + longest + " bytes");
      }
      line.write(buffer, next, end - next);
      next = end + 1;
      if (end < filled) {
        return Optional.of(line.toByteArray());
      }
    }
    if (line.size() > 0) {
      throw new EOFException("the connection ended in the middle of a message");
    }
    return Optional.empty();
  }

  private int lineEnd() {
    int end = next;
    while (end < filled && buffer[end] != '\n') {
      end++;
    }
    return end;
  }

  private boolean fill() throws IOException {
    next = 0;
    filled = Math.max(0, from.read(buffer));
    return filled > 0;
  }
}
