package beamwarden.web.stream;

import beamwarden.answer.EntryAnswer;
import beamwarden.answer.Json;
import beamwarden.answer.ProgressAnswer;
import beamwarden.ledger.Recorded;
import java.util.OptionalLong;

/**
 * One server-sent event.
 *
 * @param id the number of the entry it tells of; empty for progress
 * @param event {@code entry} or {@code progress}
 * @param data one line of JSON
 */
public record Message(OptionalLong id, String event, String data) {
  static Message of(Recorded recorded) {
    return new Message(
        OptionalLong.of(recorded.number()), "entry", Json.line(EntryAnswer.of(recorded)));
  }

  static Message of(ProgressAnswer progress) {
    return new Message(OptionalLong.empty(), "progress", Json.line(progress));
  }
}
