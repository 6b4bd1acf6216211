package beamwarden.bridge;

import static java.nio.charset.StandardCharsets.UTF_8;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.api.Assumptions.assumeTrue;

import beamwarden.instrument.InstrumentEvent;
import beamwarden.timing.TimeAnchor;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.attribute.PosixFilePermissions;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.TimeUnit;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.Timeout;
import org.junit.jupiter.api.io.TempDir;

/** Adapters as real processes, killed for real. */
@Timeout(60)
class HostProcessIT {
  private static final long SECONDS = 20;

  @TempDir private Path folder;
  private final Events events = new Events();
  private final List<ProcessHandle> started = new ArrayList<>();

  static HostProcess fake(Path folder) {
    return HostProcess.ofAdapter(
        "fake", folder, Examples.ABILITIES, Map.of("seed", "7"), TimeAnchor.real());
  }

  @AfterEach
  void killWhatIsLeft() throws IOException {
    Address.in(folder).flatMap(address -> ProcessHandle.of(address.pid())).ifPresent(started::add);
    started.forEach(ProcessHandle::destroyForcibly);
  }

  private BridgeInstrument connected() throws InterruptedException {
    BridgeInstrument instrument = new BridgeInstrument(fake(folder));
    instrument.connect(events);
    events.next(InstrumentEvent.Connected.class);
    return instrument;
  }

  private ProcessHandle host() throws IOException {
    ProcessHandle host = ProcessHandle.of(Address.in(folder).orElseThrow().pid()).orElseThrow();
    started.add(host);
    return host;
  }

  private static void awaitEnd(ProcessHandle process) throws Exception {
    process.onExit().get(SECONDS, TimeUnit.SECONDS);
  }

  private void awaitFile(String name) throws InterruptedException {
    for (int tries = 0; tries < SECONDS * 20 && !Files.exists(folder.resolve(name)); tries++) {
      Thread.sleep(50);
    }
    assertTrue(Files.exists(folder.resolve(name)), name);
  }

  private boolean closed() {
    return Files.exists(folder.resolve(FakeProvider.CLOSED));
  }

  private Process java(String main, String... arguments) throws IOException {
    List<String> command =
        new ArrayList<>(
            List.of(
                Path.of(System.getProperty("java.home"), "bin", "java").toString(),
                "-XX:TieredStopAtLevel=1",
                "-cp",
                System.getProperty("java.class.path"),
                main));
    command.addAll(List.of(arguments));
    Process process =
        new ProcessBuilder(command)
            .redirectErrorStream(true)
            .redirectOutput(folder.resolve("output").toFile())
            .start();
    started.add(process.toHandle());
    return process;
  }

  private Path settings() throws IOException {
    Path file = folder.resolve("given.json");
    byte[] content =
        ContractJson.mapper()
            .writeValueAsBytes(new HostSettings(Examples.ABILITIES, Map.of(), TimeAnchor.real()));
    return Files.write(file, content);
  }

  private HostArguments arguments(Duration idle, boolean tcp) throws IOException {
    return new HostArguments("fake", folder, settings(), idle, tcp);
  }

  @Test
  void outlivesItsDaemonAndIsFoundAgain() throws Exception {
    Process daemon = java(DaemonMain.class.getName(), folder.toString());
    awaitFile(DaemonMain.CONNECTED);
    ProcessHandle host = host();
    daemon.destroyForcibly().waitFor();

    try (BridgeInstrument instrument = connected()) {
      assertEquals(host.pid(), host().pid());
      assertFalse(closed());
      instrument.measure(1);
      assertEquals(new InstrumentEvent.Measured(1, Examples.READING), events.next());
    }
    // The daemon has ended in order: it said bye.
    awaitEnd(host);
    assertTrue(closed());
    assertEquals(Optional.empty(), Address.in(folder));
    events.nothingMore();
  }

  @Test
  void hasASessionOfItsOwnAndSecretsForItsOwnerOnly() throws Exception {
    try (BridgeInstrument instrument = connected()) {
      instrument.heartbeat(1);
      events.next(InstrumentEvent.HeartbeatSeen.class);
      for (String secret : List.of("address", "settings.json")) {
        assertEquals(
            "rw-------",
            PosixFilePermissions.toString(Files.getPosixFilePermissions(folder.resolve(secret))),
            secret);
      }
      Path stat = Path.of("/proc/" + host().pid() + "/stat");
      assumeTrue(Files.exists(stat), "no /proc here: the session of a process cannot be read");
      // After the name in brackets: state, parent, process group, session.
      String ownSession = "(?s).*\\) \\S+ \\d+ \\d+ " + host().pid() + " .*";
      assertTrue(Files.readString(stat).matches(ownSession), () -> "not " + ownSession);
    }
  }

  @Test
  void isStartedAfreshWhenItWasKilled() throws Exception {
    BridgeInstrument instrument = connected();
    ProcessHandle first = host();
    first.destroyForcibly();
    events.lost();
    instrument.connect(events);
    events.next(InstrumentEvent.Connected.class);
    assertNotEquals(first.pid(), host().pid());

    // Told to end, it blanks the beam first.
    host().destroy();
    events.lost();
    awaitEnd(started.get(started.size() - 1));
    assertTrue(closed());
    instrument.close();
    events.nothingMore();
  }

  @Test
  void isReplacedWhenTheProfileHasChanged() throws Exception {
    BridgeInstrument before = connected();
    ProcessHandle first = host();
    Events later = new Events();
    try (BridgeInstrument instrument =
        new BridgeInstrument(
            HostProcess.ofAdapter(
                "fake", folder, Examples.ABILITIES, Map.of("seed", "8"), TimeAnchor.real()))) {
      instrument.connect(later);
      later.next(InstrumentEvent.Connected.class);
      assertTrue(closed(), "the first host has let go of the instrument");
      Files.delete(folder.resolve(FakeProvider.CLOSED));
      assertNotEquals(first.pid(), host().pid());
      assertFalse(first.isAlive());
    }
    events.lost();
    before.close();
  }

  @Test
  void leavesAnInstrumentToTheHostThatHasIt() throws Exception {
    try (BridgeInstrument instrument = connected()) {
      Process second =
          java(
              HostMain.class.getName(),
              arguments(HostArguments.USUAL_IDLE, true).toList().toArray(new String[0]));
      assertTrue(second.waitFor(SECONDS, TimeUnit.SECONDS));
      assertEquals(3, second.exitValue());
      assertEquals(
          "beamwarden host: another host works in "
              + folder
              + "; end that one first, or give this one another folder",
          Files.readString(folder.resolve("output"), UTF_8).trim());
      instrument.measure(1);
      assertEquals(new InstrumentEvent.Measured(1, Examples.READING), events.next());
    }
  }

  @Test
  void endsByItselfWhenNoDaemonComes() throws Exception {
    Process host =
        java(
            HostMain.class.getName(),
            arguments(Duration.ofMillis(100), true).toList().toArray(new String[0]));
    assertTrue(host.waitFor(SECONDS, TimeUnit.SECONDS));
    assertEquals(0, host.exitValue());
    assertTrue(closed());
    assertEquals(Optional.empty(), Address.in(folder));
  }

  @Test
  void worksOverTheStreamsOfAChild() throws Exception {
    List<String> command = HostProcess.java(arguments(HostArguments.USUAL_IDLE, false));
    ChildProcess child = new ChildProcess(command, folder.resolve("child.log"));
    try (BridgeInstrument instrument = new BridgeInstrument(child)) {
      instrument.connect(events);
      events.next(InstrumentEvent.Connected.class);
      instrument.measure(1);
      assertEquals(new InstrumentEvent.Measured(1, Examples.READING), events.next());
    }
    assertTrue(closed());
    assertTrue(
        Files.readString(folder.resolve("child.log")).startsWith("opening the fake instrument"));
    events.nothingMore();
  }

  @Test
  void endsWithItsStreamsAsAChild() throws Exception {
    List<String> command = HostProcess.java(arguments(HostArguments.USUAL_IDLE, false));
    Process child =
        new ProcessBuilder(command).redirectError(folder.resolve("child.log").toFile()).start();
    started.add(child.toHandle());
    child.getOutputStream().close();
    assertTrue(child.waitFor(SECONDS, TimeUnit.SECONDS));
    assertTrue(closed());
  }

  @Test
  void saysWhyAProcessDidNotStart() throws Exception {
    HostProcess broken = new HostProcess(folder, List.of("false"));
    try (BridgeInstrument instrument = new BridgeInstrument(broken)) {
      instrument.connect(events);
      assertEquals(
          "no adapter in " + folder + ": its process ended with code 1; see its host.log",
          events.lost());
      BridgeInstrument missing =
          new BridgeInstrument(new HostProcess(folder, List.of("/no/such/program")));
      missing.connect(events);
      String reason = events.lost();
      assertTrue(reason.contains("/no/such/program"), reason);
      missing.close();
    }
  }

  @Test
  void doesNotTrustAnAddressThatOthersCanRead() throws Exception {
    new Address("127.0.0.1", 7, "x", 1).writeTo(folder);
    Files.setPosixFilePermissions(
        folder.resolve("address"), PosixFilePermissions.fromString("rw-r--r--"));
    try (BridgeInstrument instrument = new BridgeInstrument(fake(folder))) {
      instrument.connect(events);
      assertTrue(events.lost().contains("is open to others than its owner"));
    }
    Files.delete(folder.resolve("address"));
  }
}
