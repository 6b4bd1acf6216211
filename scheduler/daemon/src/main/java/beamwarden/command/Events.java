package beamwarden.command;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStream;
import java.io.InputStreamReader;
import java.nio.charset.StandardCharsets;
import java.util.Optional;

/** Reads a stream of server-sent events. */
final class Events implements AutoCloseable {
  private final BufferedReader lines;

  Events(InputStream in) {
    lines = new BufferedReader(new InputStreamReader(in, StandardCharsets.UTF_8));
  }

  /**
   * One event.
   *
   * @param kind its kind
   * @param data its data
   */
  record Event(String kind, String data) {}

  /** The next event; empty at the end of the stream. */
  Optional<Event> next() throws IOException {
    String kind = "";
    StringBuilder data = new StringBuilder();
    for (String line = lines.readLine(); line != null; line = lines.readLine()) {
      if (line.isEmpty() && data.length() > 0) {
        return Optional.of(new Event(kind, data.toString()));
      }
      if (line.startsWith("event:")) {
        kind = line.substring("event:".length()).strip();
      } else if (line.startsWith("data:")) {
        data.append(line.substring("data:".length()).strip());
      }
    }
    return Optional.empty();
  }

  @Override
  public void close() throws IOException {
    lines.close();
  }
}
