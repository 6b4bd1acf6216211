package beamwarden.document;

import beamwarden.profile.Profile;
import beamwarden.queue.Queue;
import java.nio.file.Path;

/**
 * Reads queues, in YAML or JSON, and checks them against the profile of the instrument that is to
 * run them.
 *
 * <p>All problems of a queue are told at once. What is checked here needs no history: whether every
 * value is understood, within the instrument's limits and within its reach. Dose and time are
 * checked elsewhere.
 */
public final class QueueDocuments {
  private QueueDocuments() {}

  /** Reads a queue from a file. */
  public static Reading<Queue> read(Path file, Profile profile) {
    return Documents.read(file, (name, text) -> read(name, text, profile));
  }

  /** Reads a queue from a text; {@code name} stands for the file in problems. */
  public static Reading<Queue> read(String name, String text, Profile profile) {
    Problems problems = new Problems(name);
    return problems.reading(
        Documents.tree(text, problems)
            .flatMap(top -> new QueueReader(profile, problems).read(top)));
  }
}
