package beamwarden.simulated;

import java.time.Duration;
import java.util.List;
import java.util.Optional;

/** Decides what goes wrong, and when; asked at every step of the adapter. */
@FunctionalInterface
public interface FaultPlan {
  /** Nothing ever goes wrong. */
  FaultPlan NONE = (step, exposed) -> Optional.empty();

  /**
   * What goes wrong at a step.
   *
   * @param step the step that is about to be done, or was just done
   * @param exposed the number of the grant among all that were ever exposed here, from 1 on: of the
   *     one that has begun and not ended, else of the next one
   */
  Optional<Strike> at(Step step, long exposed);

  /** What goes wrong at set times. */
  default List<Timed> timed() {
    return List.of();
  }

  /** The steps at which something can go wrong. */
  enum Step {
    /** Before conditions are prepared. */
    PREPARE,
    /** Before the current is measured. */
    MEASURE,
    /** Before it is noted that an exposure begins. */
    BEFORE_BEGUN_NOTE,
    /** After it is noted, before the beam comes on. */
    AFTER_BEGUN_NOTE,
    /** While the beam is on. */
    MID_EXPOSURE,
    /** After the beam is blanked, before the receipt is kept. */
    BEFORE_RECEIPT_KEPT,
    /** After the receipt is kept, before it is sent. */
    AFTER_RECEIPT_KEPT,
    /** After the fence is raised, before the seal is answered. */
    SEAL
  }

  /**
   * Something that goes wrong.
   *
   * @param mishap what
   * @param share how far into the exposure, from 0 to 1; read in the middle of an exposure only
   */
  record Strike(Mishap mishap, double share) {
    /** Refuses a share outside 0 to 1. */
    public Strike {
      if (!(share >= 0 && share <= 1)) {
        throw new IllegalArgumentException("a share must be from 0 to 1, not " + share);
      }
    }
  }

  /**
   * Something that goes wrong at a set time.
   *
   * @param after the time since the hardware was first opened
   * @param mishap what
   */
  record Timed(Duration after, Mishap mishap) {}
}
