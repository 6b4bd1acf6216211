package beamwarden.wiring;

import beamwarden.timing.TimeAnchor;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Instant;
import java.util.Optional;
import java.util.OptionalDouble;
import tools.jackson.core.JacksonException;
import tools.jackson.databind.json.JsonMapper;

/**
 * Keeps a store's line of time: real, or paced from a chosen beginning.
 *
 * <p>The line is chosen once, with a new store, and kept in a file; it goes on while no daemon
 * runs. An instrument's process is given the same line.
 */
final class LineOfTime {
  private static final JsonMapper JSON = new JsonMapper();

  private LineOfTime() {}

  /**
   * The line of a store; chosen now when the store is new.
   *
   * @param folder the store
   * @param pace the wished pace, if one was given
   * @param from the wished beginning, if one was given
   */
  static TimeAnchor of(ServeFolder folder, OptionalDouble pace, Optional<Instant> from) {
    Path file = folder.lineOfTime();
    if (Files.exists(file)) {
      return unchanged(read(file), folder, pace, from);
    }
    TimeAnchor chosen = choose(pace, from);
    try {
      ServeFolder.writePrivately(file, JSON.writeValueAsString(chosen) + "\n");
    } catch (IOException failure) {
      throw new WiringException(file + " cannot be written: " + failure.getMessage());
    }
    return chosen;
  }

  /** The line of a store, if it has one. */
  static Optional<TimeAnchor> known(ServeFolder folder) {
    return Files.exists(folder.lineOfTime())
        ? Optional.of(read(folder.lineOfTime()))
        : Optional.empty();
  }

  private static TimeAnchor choose(OptionalDouble pace, Optional<Instant> from) {
    if (pace.isEmpty() && from.isEmpty()) {
      return TimeAnchor.real();
    }
    Instant now = Instant.now();
    return new TimeAnchor(from.orElse(now), now, pace.orElse(1));
  }

  private static TimeAnchor read(Path file) {
    try {
      return JSON.readValue(Files.readString(file), TimeAnchor.class);
    } catch (IOException | JacksonException failure) {
      throw new WiringException(
          file + " cannot be read; it says how this store's time runs: restore it from a backup");
    }
  }

  private static TimeAnchor unchanged(
      TimeAnchor kept, ServeFolder folder, OptionalDouble pace, Optional<Instant> from) {
    if (pace.isPresent() && pace.getAsDouble() != kept.pace()) {
      throw new WiringException(
          "the store "
              + folder.root()
              + " runs at pace "
              + kept.pace()
              + ", not "
              + pace.getAsDouble()
              + "; leave --pace out, or take another store");
    }
    if (from.isPresent() && !from.get().equals(kept.onLine())) {
      throw new WiringException(
          "the store "
              + folder.root()
              + " has a line of time already, begun at "
              + kept.onLine()
              + "; leave --from out, or take another store");
    }
    return kept;
  }
}
