package beamwarden.system;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.api.Assumptions.assumeTrue;

import beamwarden.document.ProfileDocuments;
import beamwarden.document.QueueDocuments;
import beamwarden.document.Reading;
import beamwarden.instrument.AdapterProvider;
import beamwarden.profile.Profile;
import beamwarden.queue.Queue;
import beamwarden.simulated.SimulatedProvider;
import beamwarden.timing.VirtualTime;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import java.util.concurrent.TimeUnit;
import java.util.regex.Pattern;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;

/** Holds what the Markdown files say against the program: links, queues, the service unit. */
class DocumentationTest {
  private static final Path PROFILE = Repository.ROOT.resolve("queue-examples/north-room.yaml");

  /** A class of ours as the guide names it: with its package below ours. */
  private static final Pattern CLASS = Pattern.compile("`([a-z]+(?:\\.[a-z]+)*\\.[A-Z]\\w+)`");

  /** Fewer than there are, so that an empty look cannot pass. */
  private static final int FEWEST_FILES = 5;

  @Test
  void theMarkdownFilesAreFound() {
    assertTrue(Markdown.all().size() >= FEWEST_FILES, "only " + Markdown.all().size());
  }

  @ParameterizedTest
  @MethodSource("files")
  void everyLinkLeadsToAFileAndAHeadingThatExist(Markdown page) {
    assertEquals(List.of(), page.broken(), page.file().toString());
  }

  static Stream<Markdown> files() {
    return Markdown.all().stream();
  }

  @Test
  void everyQueueInTheReadmeIsReadWithoutAProblem() {
    List<Markdown.Block> queues =
        Markdown.of("README.md").blocks().stream()
            .filter(block -> block.language().equals("yaml"))
            .toList();
    assertFalse(queues.isEmpty(), "the README shows no queue");
    Profile profile = ProfileDocuments.read(PROFILE).value().orElseThrow();
    for (Markdown.Block queue : queues) {
      Reading<Queue> reading = QueueDocuments.read("README.md", queue.text(), profile);
      assertEquals(List.of(), reading.problems());
      assertTrue(reading.value().isPresent());
    }
  }

  @ParameterizedTest
  @ValueSource(strings = {"ops/demo", "ops/test"})
  void theCommandsThatTheReadmeOpensWithExist(String command) {
    assertEquals(List.of(command), Markdown.of("README.md").commands(command));
    assertTrue(Files.isExecutable(Repository.ROOT.resolve(command)), command);
  }

  @Test
  void everyClassThatTheDevelopersGuideNamesExists() {
    List<String> missing =
        CLASS
            .matcher(Markdown.of("DEVELOPERS.md").text())
            .results()
            .map(name -> "beamwarden." + name.group(1))
            .filter(name -> !exists(name))
            .toList();
    assertEquals(List.of(), missing);
  }

  private static boolean exists(String name) {
    return DocumentationTest.class.getResource("/" + name.replace('.', '/') + ".class") != null;
  }

  /** Long enough to say what must be said, short enough to be read. */
  @Test
  void theReadmeIsReadInOneSitting() {
    String text = Markdown.of("README.md").text();
    long lines = text.lines().count();
    assertTrue(lines >= 120 && lines <= 160, lines + " lines");
    int words = text.strip().split("\\s+", -1).length;
    assertTrue(words <= 900, words + " words");
  }

  /** The adapter itself names its options when it is given one that it does not know. */
  @Test
  void theOptionsOfTheSimulatedInstrumentAreThoseThatItKnows() {
    AdapterProvider.Setting setting =
        new AdapterProvider.Setting(Lab.abilities(), Path.of("unused"), Map.of("colour", "green"));
    IllegalArgumentException refusal =
        assertThrows(
            IllegalArgumentException.class,
            () -> new SimulatedProvider().open(setting, new VirtualTime(Lab.AFTERNOON)));
    String known = refusal.getMessage().replaceAll(".*it knows ", "");
    String section =
        Markdown.of("ops/settings.md")
            .text()
            .replaceAll("(?s).*### Options of the simulated instrument", "")
            .replaceAll("(?s)\n##.*", "");
    List<String> documented =
        Pattern.compile("\\*\\*`([a-z]+)`\\*\\*")
            .matcher(section)
            .results()
            .map(entry -> entry.group(1))
            .sorted()
            .toList();
    assertEquals(List.of(known.split(", ", -1)), documented);
  }

  /** As it stands but for the place of the checkout, which is the administrator's choice. */
  @Test
  void theServiceUnitIsOneThatSystemdTakes(@TempDir Path folder) throws Exception {
    assumeTrue(systemd(List.of("--version")).isEmpty(), "skipped: there is no systemd-analyze");
    Path unit = folder.resolve("beamwarden.service");
    Files.writeString(
        unit,
        Repository.read(Repository.ROOT.resolve("ops/beamwarden.service"))
            .replace("/opt/beamwarden", Repository.ROOT.toString()));
    String complaints = systemd(List.of("verify", unit.toString()));
    assertEquals(
        List.of(), complaints.lines().filter(line -> line.contains("beamwarden")).toList());
  }

  /** What it complains of; a missing program complains of that. */
  private static String systemd(List<String> arguments) throws InterruptedException {
    try {
      Process process =
          new ProcessBuilder(
                  Stream.concat(Stream.of("systemd-analyze"), arguments.stream()).toList())
              .redirectOutput(ProcessBuilder.Redirect.DISCARD)
              .start();
      String complaints =
          new String(process.getErrorStream().readAllBytes(), StandardCharsets.UTF_8);
      process.waitFor(1, TimeUnit.MINUTES);
      return complaints;
    } catch (IOException missing) {
      return missing.getMessage();
    }
  }
}
