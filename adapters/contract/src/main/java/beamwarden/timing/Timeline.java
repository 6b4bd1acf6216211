package beamwarden.timing;

import java.time.Duration;
import java.time.InstantSource;

/**
 * A line of time on which things can be asked to happen later.
 *
 * <p>Tasks run one at a time, those due at the same moment in the order in which they were asked
 * for.
 */
public interface Timeline extends InstantSource, Ticker {
  /** Runs {@code task} once, {@code delay} from now on this line; a delay below zero is now. */
  Waiting after(Duration delay, Runnable task);

  /** Something that was asked to happen and can be called off. */
  interface Waiting {
    /** Calls it off; does nothing when it has already begun. */
    void cancel();
  }
}
