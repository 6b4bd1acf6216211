package beamwarden.command;

import beamwarden.answer.EntryAnswer;
import beamwarden.answer.ProgressAnswer;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;

/** A progress bar for each job on a terminal, drawn over itself; at most 80 columns wide. */
final class Bars implements Showing {
  private static final int NAME_WIDTH = 24;
  private static final int BAR_WIDTH = 24;

  /** More than fit a small terminal would not be drawn over themselves. */
  private static final int BARS_MAX = 20;

  private static final String ESCAPE = "\u001b[";
  private static final String CLEAR = ESCAPE + "2K";

  private final Surroundings surroundings;
  private int drawn;

  Bars(Surroundings surroundings) {
    this.surroundings = surroundings;
  }

  @Override
  public void begin(Board board) {
    draw(board);
  }

  @Override
  public void entry(Board board, EntryAnswer told) {
    draw(board);
  }

  @Override
  public void progress(Board board, String job, String json) {
    draw(board);
  }

  private void draw(Board board) {
    List<String> lines = lines(board);
    StringBuilder text = new StringBuilder();
    if (drawn > 0) {
      text.append(ESCAPE).append(drawn).append('A');
    }
    lines.forEach(line -> text.append(CLEAR).append(line).append('\n'));
    for (int gone = lines.size(); gone < drawn; gone++) {
      text.append(CLEAR).append('\n');
    }
    drawn = Math.max(drawn, lines.size());
    surroundings.answer(text.toString());
  }

  /** The lines of the picture; jobs that have ended give way when there are too many. */
  static List<String> lines(Board board) {
    List<ProgressAnswer> jobs = List.copyOf(board.jobs());
    List<ProgressAnswer> shown =
        jobs.stream()
            .filter(job -> jobs.size() <= BARS_MAX || job.ended().isEmpty())
            .limit(BARS_MAX)
            .toList();
    List<String> lines = new ArrayList<>();
    lines.add(board.time() + "  " + board.instrument());
    shown.stream().map(Bars::line).forEach(lines::add);
    if (shown.size() < jobs.size()) {
      lines.add("and " + (jobs.size() - shown.size()) + " more");
    }
    return lines;
  }

  private static String line(ProgressAnswer job) {
    int percent = job.doneFraction() < 1 ? (int) Math.min(99, job.doneFraction() * 100) : 100;
    return String.format(
        Locale.ROOT,
        "%-" + NAME_WIDTH + "s %-9s |%s| %3d %%  %5d",
        cut(job.id()),
        job.state(),
        bar(job.doneFraction()),
        percent,
        job.exposures());
  }

  private static String bar(double fraction) {
    int full = (int) Math.floor(Math.max(0, Math.min(1, fraction)) * BAR_WIDTH);
    return "#".repeat(full) + ".".repeat(BAR_WIDTH - full);
  }

  private static String cut(String name) {
    return name.length() <= NAME_WIDTH ? name : name.substring(0, NAME_WIDTH - 1) + "~";
  }
}
