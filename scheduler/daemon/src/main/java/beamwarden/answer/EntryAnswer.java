package beamwarden.answer;

import beamwarden.ledger.Entry;
import beamwarden.ledger.Recorded;
import com.fasterxml.jackson.annotation.JsonInclude;
import com.fasterxml.jackson.annotation.JsonProperty;
import java.time.Instant;

/**
 * One recorded entry, as the event stream tells it. What does not apply is left out.
 *
 * @param number its place among all entries
 * @param at when it was stored
 * @param kind what kind of entry it is
 * @param job the id of the job it is about
 * @param sample the id of the sample it is about
 * @param grant the number of the grant it is about
 * @param state the state a job moved to
 * @param text one sentence, where there is something to say
 */
@JsonInclude(JsonInclude.Include.NON_NULL)
public record EntryAnswer(
    @JsonProperty("number") long number,
    @JsonProperty("at") Instant at,
    @JsonProperty("kind") String kind,
    @JsonProperty("job") String job,
    @JsonProperty("sample") String sample,
    @JsonProperty("grant") Long grant,
    @JsonProperty("state") String state,
    @JsonProperty("text") String text) {
  /** The kind of an entry with which a job moves to another state. */
  public static final String JOB_CHANGED = "job-changed";

  /** The answer that says what an entry does, in short. */
  public static EntryAnswer of(Recorded recorded) {
    EntryWords words = EntryWords.of(recorded.entry());
    Entry entry = recorded.entry();
    return new EntryAnswer(
        recorded.number(),
        recorded.at(),
        words.kind(),
        words.job().orElse(null),
        entry.chain().isEmpty() ? null : entry.chain(),
        words.grant().isPresent() ? words.grant().getAsLong() : null,
        words.state().orElse(null),
        words.text().isBlank() ? null : words.text());
  }
}
