package beamwarden.simulated;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.instrument.GrantFate;
import beamwarden.instrument.Instrument;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.timing.PacedTime;
import java.io.BufferedReader;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Instant;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.TimeUnit;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/**
 * A real process is killed in the middle of an exposure. Goal: the next one finds the beam still
 * on, blanks it, and the truth holds what went in while nobody was there.
 */
class KilledProcessIT {
  /** An hour's scan takes about five seconds. */
  private static final double PACE = 720;

  @TempDir Path folder;

  @Test
  void theScanGoesOnUntilTheNextProcessBlanksIt() throws Exception {
    Instant opened = Instant.now();
    Process process = start(opened);
    try (BufferedReader said = process.inputReader()) {
      assertEquals("exposing", said.readLine());
    } finally {
      process.destroyForcibly().waitFor();
    }
    try (PacedTime time = new PacedTime(OwnProcess.anchor(opened, PACE), "next-process")) {
      Instant killed = time.instant();
      Instrument next = OwnProcess.open(folder, time);
      List<String> truth = Files.readAllLines(folder.resolve("delivered.jsonl"));
      assertEquals(1, truth.size());
      assertTrue(ended(truth.get(0)).compareTo(killed) >= 0, truth::toString);
      assertEquals(Map.of(1L, new GrantFate.Unknown()), sealed(next));
      next.close();
    }
  }

  private Process start(Instant opened) throws IOException {
    return new ProcessBuilder(
            Path.of(System.getProperty("java.home"), "bin", "java").toString(),
            "-cp",
            System.getProperty("java.class.path"),
            OwnProcess.class.getName(),
            folder.toString(),
            opened.toString(),
            Double.toString(PACE))
        .redirectError(ProcessBuilder.Redirect.INHERIT)
        .start();
  }

  private static Instant ended(String line) {
    String mark = "\"ended\":\"";
    int from = line.indexOf(mark) + mark.length();
    return Instant.parse(line.substring(from, line.indexOf('"', from)));
  }

  private static Map<Long, GrantFate> sealed(Instrument instrument) throws Exception {
    CompletableFuture<Map<Long, GrantFate>> fates = new CompletableFuture<>();
    instrument.connect(
        event -> {
          if (event instanceof InstrumentEvent.Sealed sealed) {
            fates.complete(sealed.report().fates());
          }
        });
    instrument.seal(2, Session.STORE, Set.of(1L), false);
    return fates.get(30, TimeUnit.SECONDS);
  }
}
