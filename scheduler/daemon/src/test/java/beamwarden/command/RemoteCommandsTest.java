package beamwarden.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.instrument.StopWhen;
import beamwarden.run.Event;
import beamwarden.web.FakeDesk;
import beamwarden.web.Served;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class RemoteCommandsTest {
  private static final Path OVERNIGHT = FakeDesk.EXAMPLES.resolve("02-overnight.yaml");

  @TempDir Path store;
  private final Called.Caller caller = new Called.Caller();
  private Served served;

  @BeforeEach
  void serve() {
    served = Served.in(store, new FakeDesk());
    caller.environment.put("BEAMWARDEN_STORE", store.toString());
  }

  @AfterEach
  void close() {
    served.close();
  }

  private Event.Wish onlyWish() {
    assertEquals(1, served.desk.asked().size());
    return served.desk.asked().get(0);
  }

  @Nested
  class TheDaemon {
    @Test
    void isFoundByItsStore() {
      caller.environment.clear();
      assertEquals(0, caller.call("stop", "--store", store).code());
    }

    @Test
    void isFoundByTheEnvironment() {
      assertEquals(0, caller.call("stop").code());
    }

    @Test
    void isFoundByItsAddressAndSaysItselfWhereItsTokenLies() {
      caller.environment.clear();
      Called called = caller.call("stop", "--at", served.address);
      assertEquals(0, called.code(), called.err());
      assertEquals(new Event.Wish.Stop(StopWhen.AT_BOUNDARY), onlyWish());
    }

    @Test
    void thatDoesNotRunIsTheWorldsFailure() throws IOException {
      served.close();
      Called called = caller.call("stop");
      assertEquals(3, called.code());
      assertEquals(
          "beamwarden: no daemon answers at "
              + served.address
              + "; check that it runs, or start it with serve",
          called.err().strip());
      Files.delete(store.resolve("address"));
      Called never = caller.call("stop");
      assertEquals(3, never.code());
      assertEquals(
          "beamwarden: no daemon serves the store "
              + store
              + "; start one with beamwarden serve --store "
              + store,
          never.err().strip());
    }

    @Test
    void wantsTheRightToken() throws IOException {
      Files.writeString(store.resolve("token"), "another");
      Called called = caller.call("stop");
      assertEquals(3, called.code());
      assertTrue(called.err().contains("a change needs the header"), called.err());
      Files.delete(store.resolve("token"));
      Called without = caller.call("stop");
      assertEquals(3, without.code());
      assertTrue(without.err().contains("ask as the user who runs the daemon"), without.err());
      assertEquals(List.of(), served.desk.asked());
    }
  }

  @Nested
  class Queues {
    @Test
    void areHandedIn() {
      Called called = caller.call("submit", OVERNIGHT);
      assertEquals(0, called.code(), called.err());
      assertTrue(
          called.out().startsWith("overnight was taken in: texture, cement-survey, "),
          called.out());
      assertEquals("overnight", ((Event.Wish.Submit) onlyWish()).queue().name());
    }

    @Test
    void areHandedInAsJsonToo() {
      Called called =
          caller.call("submit", FakeDesk.EXAMPLES.resolve("01-first-look.json"), "--json");
      assertEquals(0, called.code(), called.err());
      assertEquals(1, called.json().get("jobs").size());
    }

    @Test
    void withProblemsAreSentBackWithEachPlace() throws IOException {
      Path broken = Files.writeString(store.resolve("broken.yaml"), "queue: x\njobs: 7\n");
      Called called = caller.call("submit", broken);
      assertEquals(1, called.code());
      assertTrue(called.err().startsWith("broken.yaml:"), called.err());
      assertTrue(called.err().contains("beamwarden: the queue has "), called.err());
      assertEquals("", called.out());
      Called json = caller.call("submit", broken, "--json");
      assertEquals(1, json.code());
      assertEquals("broken.yaml", json.json().get("problems").get(0).get("file").asString());
    }

    @Test
    void thatTheRunRefusesAreANo() {
      served.desk.answer(Optional.of("the store already has texture"));
      Called called = caller.call("submit", OVERNIGHT);
      assertEquals(1, called.code());
      assertEquals("beamwarden: the store already has texture", called.err().strip());
    }

    @Test
    void thatAreNotThereAreAWrongCall() {
      assertEquals(2, caller.call("submit", "missing.yaml").code());
    }
  }

  @Nested
  class Changes {
    @Test
    void areMadeOfJobsByName() {
      served.submitOvernight();
      Called called = caller.call("hold", "texture", "vein");
      assertEquals(0, called.code(), called.err());
      assertEquals("texture is ready\nvein is waiting\n", called.out());
      assertEquals(new Event.Wish.Hold(List.of("texture", "vein")), onlyWish());
    }

    @Test
    void areMadeOfAllJobs() {
      served.submitOvernight();
      Called released = caller.call("release", "--all");
      assertEquals(0, released.code());
      assertEquals(
          "There is no job to release.\nThe night goes on if it was stopped.\n", released.out());
      assertEquals(new Event.Wish.Release(List.of(), true), onlyWish());
      assertEquals(0, caller.call("withdraw", "--all").code());
      assertEquals(8, ((Event.Wish.Withdraw) served.desk.asked().get(1)).jobs().size());
    }

    @Test
    void ofAJobThatIsNotThereAreANo() {
      Called called = caller.call("withdraw", "nothing");
      assertEquals(1, called.code());
      assertEquals(
          "beamwarden: there is no job nothing; /api/v1/jobs lists the jobs", called.err().strip());
    }

    @Test
    void stopTheNight() {
      assertTrue(caller.call("stop").out().startsWith("The night stops at the next boundary"));
      assertTrue(caller.call("stop", "--now").out().startsWith("The beam is blanked"));
      assertEquals(
          List.of(new Event.Wish.Stop(StopWhen.AT_BOUNDARY), new Event.Wish.Stop(StopWhen.NOW)),
          served.desk.asked());
      assertEquals("north-room", caller.call("stop", "--json").json().get("instrument").asString());
    }

    @Test
    void areApprovedWithAReason() {
      Called called = caller.call("approve", "placements", "--reason", "looked at \"them\"");
      assertEquals(0, called.code(), called.err());
      assertEquals("placements is approved.\n", called.out());
      assertEquals(new Event.Wish.Approve("placements", "looked at \"them\""), onlyWish());
    }
  }

  @Nested
  class Readings {
    @Test
    void ofADoseComeFromTheDaemon() {
      served.submitOvernight();
      Called page = caller.call("dose", "dia-5");
      assertEquals(0, page.code(), page.err());
      assertTrue(page.out().startsWith("Dose of dia-5"), page.out());
      assertEquals("dia-5", caller.call("dose", "dia-5", "--json").json().get("id").asString());
      assertEquals(1, caller.call("dose", "nothing").code());
      assertEquals(List.of(), caller.workshop.stores);
    }

    @Test
    void ofANightComeFromTheDaemon() {
      served.submitOvernight();
      Called page = caller.call("report");
      assertTrue(page.out().startsWith("Night of 2031-03-12"), page.out());
      Called json = caller.call("report", "2031-03-12", "--at", served.address, "--json");
      assertEquals("2031-03-12", json.json().get("night").asString());
      assertEquals(1, caller.call("report", "2031-03-08").code());
    }

    @Test
    void comeFromTheStoreOfADaemonThatWasKilledAndLeftItsAddress() {
      served.submitOvernight();
      caller.workshop.entries = served.desk.entriesAfter(0, 100);
      served.close();
      assertTrue(caller.call("dose", "dia-5").out().startsWith("Dose of dia-5"));
      assertEquals(List.of(store), caller.workshop.stores);
    }

    @Test
    void comeFromTheStoreWhenAnotherDaemonTookTheAddress(@TempDir Path another) throws IOException {
      Files.copy(store.resolve("address"), another.resolve("address"));
      served.submitOvernight();
      caller.workshop.entries = served.desk.entriesAfter(0, 100);
      assertTrue(caller.call("dose", "dia-5", "--store", another).out().startsWith("Dose of"));
      assertEquals(List.of(another), caller.workshop.stores);
    }

    @Test
    void comeFromAStoreInWhichNoDaemonIsAtWork() throws IOException {
      served.submitOvernight();
      caller.workshop.entries = served.desk.entriesAfter(0, 100);
      served.close();
      Files.delete(store.resolve("address"));
      Called page = caller.call("dose", "dia-5");
      assertEquals(0, page.code(), page.err());
      assertTrue(page.out().startsWith("Dose of dia-5"), page.out());
      assertEquals("2031-03-12", caller.call("report", "--json").json().get("night").asString());
      assertEquals(1, caller.call("dose", "nothing").code());
      assertEquals(1, caller.call("report", "2031-03-08").code());
      assertEquals(store, caller.workshop.stores.get(0));
    }
  }
}
