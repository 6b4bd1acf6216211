package beamwarden.command;

import beamwarden.answer.EntryAnswer;
import beamwarden.answer.ProgressAnswer;
import java.util.Set;

/**
 * Plain lines of at most 80 columns: one for each change of a job, and for what else happens in the
 * night. A reason that is too long is cut; the report has the whole of it.
 */
final class Lines implements Showing {
  private static final Set<String> WORTH_A_LINE =
      Set.of(
          "fault",
          "stopped",
          "goes-on",
          "shift-opened",
          "shift-closed",
          "approved",
          "grant-presumed",
          "queue-submitted");

  private static final int WIDTH = 80;
  private static final String CUT = "...";

  private final Surroundings surroundings;

  Lines(Surroundings surroundings) {
    this.surroundings = surroundings;
  }

  @Override
  public void begin(Board board) {
    for (ProgressAnswer job : board.jobs()) {
      line(board.time(), job.id() + " " + job.state() + reason(job.because()));
    }
  }

  @Override
  public void entry(Board board, EntryAnswer told) {
    String text = told.text() == null ? "" : told.text();
    if (told.kind().equals(EntryAnswer.JOB_CHANGED)) {
      line(board.time(told.at()), told.job() + " " + told.state() + reason(text));
    } else if (told.kind().equals("job-trimmed")) {
      line(board.time(told.at()), told.job() + " is trimmed" + reason(text));
    } else if (WORTH_A_LINE.contains(told.kind())) {
      line(board.time(told.at()), told.kind() + reason(text));
    }
  }

  @Override
  public void progress(Board board, String job, String json) {
    // Its state comes as an entry, and nobody wants a line for every percent.
  }

  private void line(String time, String text) {
    String line = time + "  " + text;
    boolean fits = line.length() <= WIDTH;
    surroundings.answer((fits ? line : line.substring(0, WIDTH - CUT.length()) + CUT) + "\n");
  }

  private static String reason(String text) {
    return text.isBlank() ? "" : ": " + text;
  }
}
