package beamwarden.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.web.FakeDesk;
import java.nio.file.Path;
import java.time.Instant;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalLong;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class ServeCommandTest {
  private static final Path PROFILE = FakeDesk.EXAMPLES.resolve("north-room.yaml");

  @TempDir Path store;
  private final Called.Caller caller = new Called.Caller();

  @AfterEach
  void forgetWhereTheLogWent() {
    System.clearProperty("logback.configurationFile");
    System.clearProperty("beamwarden.log");
  }

  @Test
  void asksForWhatTheOptionsSay() {
    caller.call(
        "serve",
        "--instrument",
        PROFILE,
        "--store",
        store,
        "--port",
        "8123",
        "--pace",
        "600",
        "--from",
        "2031-03-12T19:00",
        "--seed",
        "7");
    Workshop.ServeAsked asked = caller.workshop.serving.get(0);
    assertEquals("north-room", asked.profile().abilities().instrument());
    assertTrue(asked.document().contains("instrument: north-room"), asked.document());
    assertEquals(store, asked.store());
    assertEquals(8123, asked.port());
    assertEquals(OptionalDouble.of(600), asked.pace());
    assertEquals(Optional.of(Instant.parse("2031-03-12T18:00:00Z")), asked.from());
    assertEquals(OptionalLong.of(7), asked.seed());
  }

  @Test
  void leavesPaceMomentAndSeedToTheStoreWithoutOptions() {
    caller.call("serve", "--instrument", PROFILE, "--store", store);
    Workshop.ServeAsked asked = caller.workshop.serving.get(0);
    assertEquals(0, asked.port());
    assertEquals(OptionalDouble.empty(), asked.pace());
    assertEquals(Optional.empty(), asked.from());
    assertEquals(OptionalLong.empty(), asked.seed());
  }

  @Test
  void cautionsAndSaysItsAddress() {
    Called called = caller.call("serve", "--instrument", PROFILE, "--store", store);
    assertTrue(called.out().startsWith("Beamwarden is no safety system."), called.out());
    assertTrue(called.out().endsWith("\nhttp://127.0.0.1:4711\n"), called.out());
    Called json = caller.call("serve", "--instrument", PROFILE, "--store", store, "--json");
    assertEquals("{\"address\":\"http://127.0.0.1:4711\"}\n", json.out());
  }

  @Test
  void endsWithWhyWhenEverythingStoppedForGood() {
    Called called = caller.call("serve", "--instrument", PROFILE, "--store", store);
    assertEquals(3, called.code());
    assertEquals(
        "beamwarden: everything has stopped: the books cannot be written", called.err().strip());
  }

  @Test
  void logsIntoItsStore() {
    caller.call("serve", "--instrument", PROFILE, "--store", store);
    assertEquals(store.resolve("log").toString(), System.getProperty("beamwarden.log"));
    assertEquals("logback-serve.xml", System.getProperty("logback.configurationFile"));
  }
}
