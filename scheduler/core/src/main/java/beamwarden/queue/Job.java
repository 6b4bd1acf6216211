package beamwarden.queue;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Region;
import java.time.Instant;
import java.util.List;
import java.util.Optional;

/**
 * One wanted acquisition.
 *
 * @param id its id, once in a store
 * @param sample the id of its sample
 * @param acquisition how it looks
 * @param region where it looks
 * @param beam what the column is set to
 * @param priority 1 to 9; a higher one matters more
 * @param after the ids of the jobs that must be done or shortened first
 * @param atCap what happens when a cap does not leave room for it
 * @param earliest not before this moment, if any
 * @param deadline not after this moment, if any
 */
public record Job(
    String id,
    String sample,
    Acquisition acquisition,
    Region region,
    BeamSettings beam,
    int priority,
    List<String> after,
    AtCap atCap,
    Optional<Instant> earliest,
    Optional<Instant> deadline) {
  /** The lowest priority. */
  public static final int LOWEST_PRIORITY = 1;

  /** The highest priority. */
  public static final int HIGHEST_PRIORITY = 9;

  /** The priority when nothing is said. */
  public static final int USUAL_PRIORITY = 5;

  /** Copies the list and refuses a priority out of range. */
  public Job {
    after = List.copyOf(after);
    if (priority < LOWEST_PRIORITY || priority > HIGHEST_PRIORITY) {
      throw new IllegalArgumentException("a priority is from 1 to 9, not " + priority);
    }
  }
}
