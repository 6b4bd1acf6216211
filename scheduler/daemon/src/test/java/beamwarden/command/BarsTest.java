package beamwarden.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.answer.JobsAnswer;
import beamwarden.answer.NowAnswer;
import beamwarden.answer.ProgressAnswer;
import java.io.PrintWriter;
import java.io.StringWriter;
import java.time.Instant;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;

class BarsTest {
  private static final Instant AT = Instant.parse("2031-03-12T18:10:00Z");

  private static ProgressAnswer job(String id, String state, double done) {
    Optional<Instant> ended = state.equals("done") ? Optional.of(AT) : Optional.empty();
    return new ProgressAnswer(
        id,
        "sst-07",
        "intensity-map",
        5,
        state,
        Optional.empty(),
        "",
        Optional.empty(),
        ended,
        12,
        done,
        Optional.empty());
  }

  private static Board board(List<ProgressAnswer> jobs) {
    NowAnswer now =
        new NowAnswer(
            "north-room",
            "exposing",
            "",
            Optional.empty(),
            AT,
            "Europe/Ljubljana",
            Optional.empty(),
            Optional.empty(),
            Optional.empty(),
            false,
            4);
    return new Board(now, new JobsAnswer(4, jobs));
  }

  @Test
  void showHowFarEachJobIs() {
    assertEquals(
        List.of(
            "19:10  north-room",
            "survey                   done      |########################| 100 %     12",
            "zones                    running   |#########...............|  40 %     12",
            "a-job-with-a-very-long-~ waiting   |........................|   0 %     12"),
        Bars.lines(
            board(
                List.of(
                    job("survey", "done", 1),
                    job("zones", "running", 0.4),
                    job("a-job-with-a-very-long-name", "waiting", 0)))));
  }

  @Test
  void areNeverFullBeforeTheJobIs() {
    String line = Bars.lines(board(List.of(job("zones", "running", 0.9999)))).get(1);
    assertTrue(line.contains("#######################.|  99 %"), line);
  }

  @Test
  void fitEightyColumnsAndATerminalHoweverManyJobsThereAre() {
    List<ProgressAnswer> many =
        IntStream.range(0, 60)
            .mapToObj(i -> job("j".repeat(i + 1), i < 30 ? "done" : "shortened", 0.5))
            .toList();
    List<String> lines = Bars.lines(board(many));
    assertEquals(22, lines.size());
    assertEquals("and 40 more", lines.get(21));
    lines.forEach(line -> assertTrue(line.length() <= 80, line));
  }

  @Test
  void areDrawnOverThemselves() {
    StringWriter out = new StringWriter();
    Bars bars =
        new Bars(
            new Surroundings(
                new PrintWriter(out), new PrintWriter(new StringWriter()), Map.of(), true, null));
    Board board = board(List.of(job("zones", "running", 0.4)));
    bars.begin(board);
    String first = out.toString();
    assertTrue(!first.contains("\u001b[2A"), first);
    bars.progress(board, "zones", "");
    assertTrue(out.toString().substring(first.length()).startsWith("\u001b[2A\u001b[2K"));
  }
}
