package beamwarden.answer;

import beamwarden.report.JobProgress;
import com.fasterxml.jackson.annotation.JsonProperty;
import java.time.Instant;
import java.util.Locale;
import java.util.Optional;

/**
 * Where a job stands, without its dose.
 *
 * @param id its id
 * @param sample the id of its sample
 * @param mode its mode
 * @param priority its priority
 * @param state its state
 * @param heldFor what it waits for when it is held: a-person, approval, placements, predecessor
 * @param because why it is in that state; may be empty
 * @param started when its first grant was stored
 * @param ended when it ended
 * @param exposures how many receipts were booked for it
 * @param doneFraction how much of it is done, from 0 to 1
 * @param running the exposure that is being made for it, if one is
 */
public record ProgressAnswer(
    @JsonProperty("id") String id,
    @JsonProperty("sample") String sample,
    @JsonProperty("mode") String mode,
    @JsonProperty("priority") int priority,
    @JsonProperty("state") String state,
    @JsonProperty("held_for") Optional<String> heldFor,
    @JsonProperty("because") String because,
    @JsonProperty("started") Optional<Instant> started,
    @JsonProperty("ended") Optional<Instant> ended,
    @JsonProperty("exposures") int exposures,
    @JsonProperty("done_fraction") double doneFraction,
    @JsonProperty("running") Optional<RunningAnswer> running) {
  /** The answer that says the same. */
  public static ProgressAnswer of(JobProgress progress) {
    return new ProgressAnswer(
        progress.id(),
        progress.sample(),
        progress.mode().text(),
        progress.priority(),
        progress.state().text(),
        progress.heldFor().map(held -> held.name().toLowerCase(Locale.ROOT).replace('_', '-')),
        progress.because(),
        progress.started(),
        progress.ended(),
        progress.exposures(),
        progress.doneFraction(),
        progress.running().map(RunningAnswer::of));
  }
}
