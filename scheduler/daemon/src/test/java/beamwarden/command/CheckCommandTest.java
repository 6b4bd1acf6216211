package beamwarden.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.ledger.Entry;
import beamwarden.ledger.Recorded;
import beamwarden.web.FakeDesk;
import beamwarden.web.Served;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import tools.jackson.databind.JsonNode;

class CheckCommandTest {
  private static final Path PROFILE = FakeDesk.EXAMPLES.resolve("north-room.yaml");
  private static final Path OVERNIGHT = FakeDesk.EXAMPLES.resolve("02-overnight.yaml");

  @TempDir Path folder;
  private final Called.Caller caller = new Called.Caller();

  private Path queue(String text) throws IOException {
    return Files.writeString(folder.resolve("queue.yaml"), text);
  }

  /** The first example with another dwell. */
  private Path firstLook(String dwell, String more) throws IOException {
    String text = Files.readString(FakeDesk.EXAMPLES.resolve("01-first-look.yaml"));
    return queue(text.replaceFirst("dwell: [^\\n]*", "dwell: " + dwell + more));
  }

  @Test
  void answersAPageThatFitsEightyColumns() {
    Called called =
        caller.call("check", OVERNIGHT, "--instrument", PROFILE, "--from", "2031-03-12T19:00");
    assertEquals(0, called.code(), called.err());
    assertTrue(
        called.out().startsWith("Check of overnight on north-room, times of Europe/Ljubljana\n"),
        called.out());
    assertTrue(called.out().contains("grain-yield"), called.out());
    called.out().lines().forEach(line -> assertTrue(line.length() <= 80, line));
  }

  @Test
  void answersJsonWithItsStableKeys() {
    Called called =
        caller.call(
            "check", OVERNIGHT, "--instrument", PROFILE, "--from", "2031-03-12T19:00", "--json");
    JsonNode answer = called.json();
    assertEquals(List.of("ok", "jobs", "problems"), List.copyOf(answer.propertyNames()));
    assertTrue(answer.get("ok").asBoolean());
    JsonNode texture = answer.get("jobs").get(0);
    assertTrue(
        List.copyOf(texture.propertyNames())
            .containsAll(
                List.of(
                    "id",
                    "sample",
                    "mode",
                    "duration_s",
                    "exposures",
                    "charge_C",
                    "mean_e_per_nm2",
                    "highest_e_per_nm2",
                    "upper_e_per_nm2",
                    "highest_at_m",
                    "verdict",
                    "why",
                    "advice")));
    assertEquals("texture", texture.get("id").asString());
    assertEquals("fits", texture.get("verdict").asString());
    // 500 pA for 40 us on 1200 x 1200 pixels: 28.8 nC; on 450 um x 450 um 0.8877 e/nm2.
    assertEquals(28.8e-9, texture.get("charge_C").asDouble(), 1e-15);
    assertEquals(0.88768, texture.get("mean_e_per_nm2").asDouble(), 1e-4);
    assertEquals("2031-03-12T18:00:00Z", texture.get("starts").asString());
    JsonNode trimmed = answer.get("jobs").get(7);
    assertEquals("grain-yield", trimmed.get("id").asString());
    assertEquals("trimmed", trimmed.get("verdict").asString());
    assertTrue(!trimmed.get("why").asString().isBlank());
  }

  @Test
  void saysNoToAJobThatNoCapBears() throws IOException {
    Path heavy = firstLook("10 ms", "\n    frames: 64");
    Called called = caller.call("check", heavy, "--instrument", PROFILE, "--json");
    assertEquals(1, called.code(), called.err());
    JsonNode job = called.json().get("jobs").get(0);
    assertEquals("refused", job.get("verdict").asString());
    assertTrue(job.get("why").asString().contains("above the cap"), job.toString());
    assertTrue(
        job.get("advice").get(0).asString().matches("give it [0-9.]+ times less: .*"),
        job.toString());
    assertEquals(
        "write at-cap: trim to have as much of it done as fits, or at-cap: ask",
        job.get("advice").get(1).asString());
    assertTrue(job.get("duration_s").asDouble() > 0);
  }

  @Test
  void tellsEveryProblemWithItsPlaceAndAnswersCleanJson() throws IOException {
    Path broken = firstLook("12 parsec", "");
    Called called = caller.call("check", broken, "--instrument", PROFILE, "--json");
    assertEquals(1, called.code());
    assertEquals(0, called.json().get("jobs").size());
    JsonNode problem = called.json().get("problems").get(0);
    assertEquals(broken.toString(), problem.get("file").asString());
    assertTrue(
        called
            .err()
            .startsWith(
                broken
                    + ":"
                    + problem.get("line").asInt()
                    + ":"
                    + problem.get("column").asInt()
                    + ": error: "),
        called.err());
    Called page = caller.call("check", broken, "--instrument", PROFILE);
    assertEquals(1, page.code());
    assertEquals("", page.out());
  }

  @Test
  void tellsTheProblemsOfAProfileToo() throws IOException {
    Path profile = Files.writeString(folder.resolve("profile.yaml"), "instrument: north-room\n");
    Called called = caller.call("check", OVERNIGHT, "--instrument", profile);
    assertEquals(1, called.code());
    assertTrue(called.err().startsWith(profile + ":"), called.err());
  }

  @Test
  void beginsNowWithoutAMomentAndCountsWhatAStoreKnows() {
    Entry submitted = new Entry.QueueSubmitted(Served.overnight(new FakeDesk()), "hash");
    caller.workshop.entries = List.of(new Recorded(1, FakeWorkshop.NOW, 1, submitted, "hash"));
    Called called = caller.call("check", OVERNIGHT, "--instrument", PROFILE, "--store", folder);
    assertEquals(List.of(folder, folder), caller.workshop.stores);
    assertEquals(1, called.code());
    assertTrue(called.err().contains("the store already has"), called.err());
  }

  @Test
  void refusesAMomentThatIsNone() {
    Called called = caller.call("check", OVERNIGHT, "--instrument", PROFILE, "--from", "yesterday");
    assertEquals(2, called.code());
  }
}
