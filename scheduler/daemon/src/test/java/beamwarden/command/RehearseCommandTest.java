package beamwarden.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.ledger.Entry;
import beamwarden.ledger.Recorded;
import beamwarden.queue.JobState;
import beamwarden.queue.Queue;
import beamwarden.queue.Sample;
import beamwarden.web.FakeDesk;
import beamwarden.web.Served;
import java.nio.file.Path;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import tools.jackson.databind.JsonNode;

class RehearseCommandTest {
  private static final Path PROFILE = FakeDesk.EXAMPLES.resolve("north-room.yaml");
  private static final Path OVERNIGHT = FakeDesk.EXAMPLES.resolve("02-overnight.yaml");

  private final Called.Caller caller = new Called.Caller();

  /** The overnight queue, every job of it in one state. */
  private void ended(JobState state) {
    Queue queue = Served.overnight(new FakeDesk());
    List<Entry> entries = new ArrayList<>();
    entries.add(new Entry.QueueSubmitted(queue, ""));
    for (Sample sample : queue.samples()) {
      entries.add(new Entry.SampleDeclared(sample, ""));
    }
    queue
        .jobs()
        .forEach(
            job -> entries.add(new Entry.JobChanged(job.id(), state, Optional.empty(), "because")));
    List<Recorded> recorded = new ArrayList<>();
    for (Entry entry : entries) {
      recorded.add(new Recorded(recorded.size() + 1L, FakeDesk.EVENING, 1, entry, "hash"));
    }
    caller.workshop.entries = recorded;
  }

  @Test
  void asksForWhatTheOptionsSay() {
    ended(JobState.DONE);
    caller.call(
        "rehearse",
        OVERNIGHT,
        "--instrument",
        PROFILE,
        "--from",
        "2031-03-12T18:50",
        "--seed",
        "42",
        "--noise",
        "off");
    Workshop.RehearsalAsked asked = caller.workshop.rehearsals.get(0);
    assertEquals("overnight", asked.queue().name());
    assertEquals(Instant.parse("2031-03-12T17:50:00Z"), asked.from());
    assertEquals(42, asked.seed());
    assertFalse(asked.noise());
    assertEquals(List.of(), asked.known());
  }

  @Test
  void beginsNowWithNoiseAndASeedOfItsOwn() {
    ended(JobState.DONE);
    caller.call("rehearse", OVERNIGHT, "--instrument", PROFILE);
    Workshop.RehearsalAsked asked = caller.workshop.rehearsals.get(0);
    assertEquals(FakeWorkshop.NOW, asked.from());
    assertEquals(1, asked.seed());
    assertTrue(asked.noise());
  }

  @Test
  void reportsTheNightAndSaysYesWhenEverythingIsDone() {
    ended(JobState.DONE);
    Called page = caller.call("rehearse", OVERNIGHT, "--instrument", PROFILE);
    assertEquals(0, page.code(), page.err());
    assertTrue(page.out().startsWith("Night of 2031-03-12, north-room"), page.out());
    JsonNode answer = caller.call("rehearse", OVERNIGHT, "--instrument", PROFILE, "--json").json();
    assertEquals("2031-03-12", answer.get("night").asString());
    assertEquals(8, answer.get("jobs").size());
    assertEquals("done", answer.get("jobs").get(0).get("state").asString());
  }

  @Test
  void saysNoWhenSomethingIsNotDone() {
    ended(JobState.REFUSED);
    Called called = caller.call("rehearse", OVERNIGHT, "--instrument", PROFILE);
    assertEquals(1, called.code());
    assertTrue(called.out().contains("texture  refused: because"), called.out());
  }

  @Test
  void saysWhyAQueueWasNotTaken() {
    caller.workshop.refusal = Optional.of("the store already has texture");
    Called called = caller.call("rehearse", OVERNIGHT, "--instrument", PROFILE);
    assertEquals(1, called.code());
    assertEquals("beamwarden: the store already has texture", called.err().strip());
    assertEquals("", called.out());
  }
}
