package beamwarden.bridge;

import static java.nio.charset.StandardCharsets.UTF_8;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.api.Assumptions.assumeTrue;

import beamwarden.instrument.GrantFate;
import beamwarden.instrument.InstrumentEvent;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Set;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.Timeout;
import org.junit.jupiter.api.io.TempDir;

/** Holds {@code ops/bridge-messages.md} against the program. */
@Timeout(30)
class DocumentedMessagesTest {
  private static List<String> block(String language) throws IOException {
    Path root = Path.of(System.getProperty("beamwarden.root"));
    List<String> lines = new ArrayList<>();
    boolean within = false;
    for (String line : Files.readAllLines(root.resolve("ops/bridge-messages.md"), UTF_8)) {
      if (line.startsWith("```")) {
        within = line.equals("```" + language);
      } else if (within) {
        lines.add(line);
      }
    }
    return lines;
  }

  @Test
  void showsOnlyLinesThatTheProgramReadsAndWrites() throws Exception {
    for (String line : block("json")) {
      assertEquals(line, new String(Messages.write(Messages.read(line.getBytes(UTF_8))), UTF_8));
    }
  }

  @Test
  void showsEveryMessage() throws Exception {
    List<String> shown = block("json");
    for (Map.Entry<String, Message> example : Examples.messages().entrySet()) {
      String line = new String(Messages.write(example.getValue()), UTF_8);
      assertTrue(shown.contains(line), example.getKey() + " is missing: " + line);
    }
  }

  @Test
  void namesEveryErrorCode() throws IOException {
    Path root = Path.of(System.getProperty("beamwarden.root"));
    String text = Files.readString(root.resolve("ops/bridge-messages.md"), UTF_8);
    for (ErrorCode code : ErrorCode.values()) {
      assertTrue(text.contains("| " + code.number() + " |"), code.name());
    }
    assertTrue(text.contains(Integer.toString(Wire.LONGEST_MESSAGE_BYTES)));
  }

  @Test
  void showsAnAdapterInPythonThatWorks(@TempDir Path folder) throws Exception {
    assumeTrue(
        Files.isExecutable(Path.of("/usr/bin/python3")),
        "no /usr/bin/python3 here: the documented adapter was not run");
    Path script = Files.write(folder.resolve("adapter.py"), block("python"));
    Events events = new Events();
    try (BridgeInstrument instrument =
        new BridgeInstrument(
            new ChildProcess(
                List.of("/usr/bin/python3", script.toString()), folder.resolve("log")))) {
      instrument.connect(events);
      assertEquals("bench", events.next(InstrumentEvent.Connected.class).abilities().instrument());
      instrument.seal(1, "5f0c1d2e", Set.of(17L), false);
      assertEquals(
          Map.of(17L, new GrantFate.NeverBegun()),
          events.next(InstrumentEvent.Sealed.class).report().fates());
      instrument.heartbeat(1);
      events.next(InstrumentEvent.HeartbeatSeen.class);
      instrument.prepare(1, Examples.VIOLET, Examples.STAGE);
      events.next(InstrumentEvent.NotPrepared.class);
      instrument.measure(2);
      events.next(InstrumentEvent.NotMeasured.class);
      instrument.begin(Examples.GRANT);
      events.next(InstrumentEvent.NotBegun.class);
      instrument.windDown();
      events.next(InstrumentEvent.WoundDown.class);
    }
    events.nothingMore();
    assertEquals("", Files.readString(folder.resolve("log")));
  }
}
