package beamwarden.run;

import java.util.Locale;

/** What an instrument is doing, as people see it. */
public enum InstrumentState {
  /** A shift is open and the next thing has not begun yet. */
  IDLE,
  /** It goes to other conditions, measures the current, or is about to be handed a grant. */
  PREPARING,
  /** A grant is in its hands. */
  EXPOSING,
  /** There is no shift, or nothing to do in it. */
  STANDING_BY,
  /** A person or a fault holds it. */
  STOPPED,
  /** It is not connected, or not sealed by this run yet. */
  UNREACHABLE;

  /** The state's name for people and programs: lower case with hyphens. */
  public String text() {
    return name().toLowerCase(Locale.ROOT).replace('_', '-');
  }

  static InstrumentState of(RunState state) {
    if (state.halted().isPresent()) {
      return STOPPED;
    }
    if (!state.link().online()) {
      return UNREACHABLE;
    }
    if (state.current().filter(Slot::sentOut).isPresent()) {
      return EXPOSING;
    }
    if (state.books().stopped().isPresent()) {
      return STOPPED;
    }
    boolean preparing =
        state.doing() instanceof Doing.Preparing || state.doing() instanceof Doing.Measuring;
    if (preparing || state.current().isPresent()) {
      return PREPARING;
    }
    return state.standingBy().isEmpty() ? IDLE : STANDING_BY;
  }
}
