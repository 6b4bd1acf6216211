package beamwarden.report;

import beamwarden.run.InstrumentState;
import beamwarden.run.RunSetup;
import beamwarden.run.RunState;
import beamwarden.shift.Shift;
import java.time.Instant;
import java.time.ZoneId;
import java.util.Optional;

/**
 * What goes on just now.
 *
 * @param instrument the instrument's name
 * @param state what it is doing
 * @param because why it stands by, is stopped or cannot be reached; may be empty
 * @param stopped why the night is stopped, if it is
 * @param now the moment, on the run's line of time
 * @param zone the lab's time zone, for people
 * @param running the exposure that is being made, if one is
 * @param shift the shift that is open, if one is
 * @param next the next shift to open, if one is coming
 * @param unconfirmed whether holder and placements wait to be confirmed
 * @param entries how many entries the books have
 */
public record NightNow(
    String instrument,
    InstrumentState state,
    String because,
    Optional<String> stopped,
    Instant now,
    ZoneId zone,
    Optional<RunningExposure> running,
    Optional<Shift> shift,
    Optional<Shift> next,
    boolean unconfirmed,
    long entries) {
  /** The view of a run at a moment. */
  public static NightNow of(RunState state, RunSetup setup, Instant now) {
    return new NightNow(
        setup.profile().abilities().instrument(),
        state.instrument(),
        because(state),
        state.halted().or(() -> state.books().stopped()),
        now,
        setup.profile().zone(),
        state.exposing().map(RunningExposure::of),
        setup.calendar().current(now),
        setup.calendar().next(now),
        state.books().unconfirmedSession().isPresent(),
        state.books().entries());
  }

  private static String because(RunState state) {
    return state.halted().or(() -> state.books().stopped()).orElse(state.standingBy());
  }
}
