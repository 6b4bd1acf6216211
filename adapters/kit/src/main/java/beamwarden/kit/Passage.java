package beamwarden.kit;

import beamwarden.timing.Timeline;
import beamwarden.timing.VirtualTime;
import java.time.Duration;
import java.time.Instant;
import java.util.function.BooleanSupplier;

/** How time passes on a rig: moved by hand, or waited for. */
public interface Passage {
  /** The present moment on the line on which the adapter lives. */
  Instant now();

  /**
   * Lets time pass until something is so.
   *
   * @return false when it was not so within {@code atMost}
   */
  boolean until(BooleanSupplier isSo, Duration atMost);

  /** Lets time pass, come what may. */
  default void pass(Duration time) {
    until(() -> false, time);
  }

  /** Moves virtual time, on the caller's thread. */
  static Passage of(VirtualTime line) {
    return new MovedTime(line);
  }

  /** Really waits while a line that is tied to the machine's clock, at any pace, goes on. */
  static Passage of(Timeline line) {
    return line instanceof VirtualTime virtual ? new MovedTime(virtual) : new AwaitedTime(line);
  }
}
