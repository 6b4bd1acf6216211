package beamwarden.command;

import beamwarden.answer.EntryAnswer;
import beamwarden.answer.Json;

/** One line of JSON for each event, as it came. */
final class JsonLines implements Showing {
  private final Surroundings surroundings;

  JsonLines(Surroundings surroundings) {
    this.surroundings = surroundings;
  }

  @Override
  public void begin(Board board) {
    board.jobs().forEach(job -> surroundings.answer(Json.line(job) + "\n"));
  }

  @Override
  public void entry(Board board, EntryAnswer told) {
    surroundings.answer(Json.line(told) + "\n");
  }

  @Override
  public void progress(Board board, String job, String json) {
    surroundings.answer(json + "\n");
  }
}
