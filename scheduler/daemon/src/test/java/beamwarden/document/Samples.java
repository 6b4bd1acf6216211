package beamwarden.document;

import beamwarden.profile.Profile;
import beamwarden.queue.Queue;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;

/** Documents that tests read, and short ways to read them. */
final class Samples {
  /** The examples that people are given. */
  static final Path EXAMPLES =
      Path.of(System.getProperty("beamwarden.root")).resolve("queue-examples");

  /** A queue without problems that uses nearly everything. */
  static final String QUEUE = resource("whole-queue.yaml");

  /** A profile without problems that uses nearly everything. */
  static final String PROFILE = resource("whole-profile.yaml");

  /** What {@link #PROFILE} says. */
  static final Profile NORTH_ROOM =
      ProfileDocuments.read("profile.yaml", PROFILE).value().orElseThrow();

  private Samples() {}

  static String resource(String name) {
    try (var in = Samples.class.getResourceAsStream(name)) {
      return new String(in.readAllBytes(), StandardCharsets.UTF_8);
    } catch (IOException failed) {
      throw new UncheckedIOException(failed);
    }
  }

  static String text(Path file) {
    try {
      return Files.readString(file);
    } catch (IOException failed) {
      throw new UncheckedIOException(failed);
    }
  }

  static Reading<Queue> queue(String text) {
    return QueueDocuments.read("queue.yaml", text, NORTH_ROOM);
  }

  /** The problems of a reading as a person sees them, without the file's name. */
  static List<String> problems(Reading<?> reading) {
    return reading.problems().stream()
        .map(problem -> problem.text().substring(problem.file().length() + 1))
        .toList();
  }
}
