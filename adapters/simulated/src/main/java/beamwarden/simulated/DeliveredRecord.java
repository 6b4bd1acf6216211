package beamwarden.simulated;

import java.nio.file.Path;
import java.util.List;

/**
 * The truth: what the beam did to samples, written by the simulated instrument alone.
 *
 * <p>Nothing in the program reads it; tests hold the books against it.
 */
public interface DeliveredRecord {
  /** Adds stretches; on return they are kept, all of them. */
  void append(List<Stretch> stretches);

  /** Whether anything stands in it under a grant of that number and fence. */
  boolean holds(long grant, long fence);

  /** A record that is kept in memory, for virtual nights. */
  static MemoryRecord inMemory() {
    return new MemoryRecord();
  }

  /** A record in a file, one line of JSON for each stretch, forced to disk. */
  static DeliveredRecord in(Path file) {
    return new DeliveredFile(file);
  }
}
