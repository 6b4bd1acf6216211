package beamwarden.answer;

import beamwarden.report.NightNow;
import com.fasterxml.jackson.annotation.JsonProperty;
import java.time.Instant;
import java.util.Optional;

/**
 * What goes on just now.
 *
 * @param instrument the instrument's name
 * @param state what it is doing: idle, preparing, exposing, standing-by, stopped, unreachable
 * @param because why it stands by, is stopped or cannot be reached; may be empty
 * @param stopped why the night is stopped until a person lets it go on; null when it is not
 * @param now the moment, on the store's line of time
 * @param timeZone the lab's time zone
 * @param running the exposure that is being made, if one is
 * @param shift the shift that is open, if one is
 * @param nextShift the next shift to open, if one is coming
 * @param placementsUnconfirmed whether holder and placements wait to be confirmed
 * @param entry the number of the last entry in the books
 */
public record NowAnswer(
    @JsonProperty("instrument") String instrument,
    @JsonProperty("state") String state,
    @JsonProperty("because") String because,
    @JsonProperty("stopped") Optional<String> stopped,
    @JsonProperty("now") Instant now,
    @JsonProperty("time_zone") String timeZone,
    @JsonProperty("running") Optional<RunningAnswer> running,
    @JsonProperty("shift") Optional<ShiftAnswer> shift,
    @JsonProperty("next_shift") Optional<ShiftAnswer> nextShift,
    @JsonProperty("placements_unconfirmed") boolean placementsUnconfirmed,
    @JsonProperty("entry") long entry) {
  /** The answer that says the same. */
  public static NowAnswer of(NightNow now) {
    return new NowAnswer(
        now.instrument(),
        now.state().text(),
        now.because(),
        now.stopped(),
        now.now(),
        now.zone().getId(),
        now.running().map(RunningAnswer::of),
        now.shift().map(ShiftAnswer::of),
        now.next().map(ShiftAnswer::of),
        now.unconfirmed(),
        now.entries());
  }
}
