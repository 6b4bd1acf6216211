package beamwarden.run;

import java.time.Instant;

/**
 * A moment at which a run wants to be woken.
 *
 * @param at the moment, on the run's line of time
 * @param reason why
 */
public record Wake(Instant at, Reason reason) {
  /** Why a run wants to be woken. */
  public enum Reason {
    /** A shift opens. */
    SHIFT_OPENS,
    /** No exposure may end later. */
    WIND_DOWN,
    /** A shift closes. */
    SHIFT_CLOSES,
    /** A heartbeat is due. */
    HEARTBEAT,
    /** An answer of the instrument is overdue. */
    ANSWER_DUE,
    /** A lost connection is tried again. */
    RECONNECT,
    /** A job may start, or its deadline passes. */
    JOB_DUE
  }
}
