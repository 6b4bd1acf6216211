package beamwarden.command;

import beamwarden.document.Documents;
import beamwarden.document.Problem;
import beamwarden.document.ProfileDocuments;
import beamwarden.document.QueueDocuments;
import beamwarden.document.Reading;
import beamwarden.profile.Profile;
import beamwarden.queue.Queue;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;

/** Reads the documents that a command is given. */
final class Inputs {
  private Inputs() {}

  /**
   * A queue and the profile against which it was read.
   *
   * @param queue the queue; empty when one of the two cannot be used
   * @param profile the profile; empty when it cannot be used
   * @param problems the problems of both
   */
  record Both(Optional<Queue> queue, Optional<Profile> profile, List<Problem> problems) {
    boolean usable() {
      return queue.isPresent() && profile.isPresent();
    }
  }

  static Both read(Path queue, Path profile) {
    require(queue);
    Reading<Profile> known = profile(profile);
    if (known.value().isEmpty()) {
      return new Both(Optional.empty(), known.value(), known.problems());
    }
    Reading<Queue> reading = QueueDocuments.read(queue, known.value().get());
    List<Problem> problems =
        Stream.concat(known.problems().stream(), reading.problems().stream()).toList();
    return new Both(reading.value(), known.value(), problems);
  }

  static Reading<Profile> profile(Path file) {
    require(file);
    return ProfileDocuments.read(file);
  }

  /** The text of a document. */
  static String text(Path file) {
    require(file);
    Reading<String> text = Documents.text(file);
    return text.value()
        .orElseThrow(() -> new CommandFailure(ExitCode.OUTSIDE, text.problems().get(0).message()));
  }

  private static void require(Path file) {
    if (!Files.exists(file)) {
      throw new CommandFailure(ExitCode.USAGE, file + " does not exist; check the path");
    }
  }
}
