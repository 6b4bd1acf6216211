package beamwarden.system;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeSet;
import java.util.concurrent.TimeUnit;
import java.util.regex.Pattern;
import java.util.stream.Stream;
import org.junit.jupiter.api.AfterAll;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.DynamicTest;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.TestFactory;
import org.junit.jupiter.api.io.TempDir;

/**
 * Runs every command that a page shows in a block of its own, as it stands there: the store {@code
 * night} of the pages is a store of the test, with a daemon in a shift that is open.
 */
class DocumentedCommandsIT {
  private static final String PROGRAM = "ops/beamwarden";
  private static final String STORE = "night";
  private static final List<String> PAGES =
      List.of("README.md", "DEVELOPERS.md", "queue-examples/README.md", "ops/runbook.md");

  /** How a documented command is run. */
  private enum How {
    /** As it stands; it must be fine. */
    ALONE,
    /**
     * With {@code --help} behind it, since it would not end by itself: its words are understood.
     */
    HELP_ONLY,
    /** Before all others of the daemon, as it stands. */
    FIRST,
    /** As it stands, beside the daemon. */
    BESIDE_THE_DAEMON,
    /** The same; nothing may wait for it just now, which is an answer too. */
    OR_NOTHING_WAITS,
    /** Once the night is stopped, when it ends by itself. */
    ON_A_STOPPED_NIGHT
  }

  private static final Map<String, How> TABLE =
      Map.ofEntries(
          Map.entry("check", How.ALONE),
          Map.entry("rehearse", How.ALONE),
          Map.entry("serve", How.HELP_ONLY),
          Map.entry("submit", How.FIRST),
          Map.entry("hold", How.BESIDE_THE_DAEMON),
          Map.entry("release", How.BESIDE_THE_DAEMON),
          Map.entry("withdraw", How.BESIDE_THE_DAEMON),
          Map.entry("stop", How.BESIDE_THE_DAEMON),
          Map.entry("dose", How.BESIDE_THE_DAEMON),
          Map.entry("report", How.BESIDE_THE_DAEMON),
          Map.entry("approve", How.OR_NOTHING_WAITS),
          Map.entry("watch", How.ON_A_STOPPED_NIGHT));

  private static final Pattern WORD = Pattern.compile("\"([^\"]*)\"|(\\S+)");

  @TempDir static Path folder;
  private static Daemon daemon;

  @BeforeAll
  static void serve() throws IOException, InterruptedException {
    Path store = Files.createDirectory(folder.resolve(STORE));
    daemon = new Daemon(Repository.ROOT.resolve("queue-examples/north-room.yaml"), store);
    daemon.start("--pace", "10", "--from", "2031-03-12T19:05", "--seed", "1");
  }

  @AfterAll
  static void end() throws InterruptedException {
    daemon.stop();
  }

  @TestFactory
  Stream<DynamicTest> everyDocumentedCommandIsTaken() {
    return Stream.of(How.values())
        .flatMap(how -> commands().stream().filter(words -> TABLE.get(words.get(0)) == how))
        .map(words -> DynamicTest.dynamicTest(String.join(" ", words), () -> run(words)));
  }

  @Test
  void everyCommandThatIsShownStandsInTheTable() {
    Set<String> shown = new TreeSet<>();
    commands().forEach(words -> shown.add(words.get(0)));
    assertTrue(TABLE.keySet().containsAll(shown), shown.toString());
    assertTrue(shown.size() > TABLE.size() / 2, "only " + shown);
  }

  /** Each command once, in the order of the pages, by its words behind the program's name. */
  private static List<List<String>> commands() {
    return PAGES.stream()
        .flatMap(page -> Markdown.of(page).commands(PROGRAM).stream())
        .map(line -> words(line.substring(PROGRAM.length())))
        .distinct()
        .toList();
  }

  private static List<String> words(String line) {
    return WORD.matcher(line)
        .results()
        .map(word -> word.group(1) == null ? word.group(2) : word.group(1))
        .toList();
  }

  private static void run(List<String> words) throws IOException, InterruptedException {
    List<String> asked = new ArrayList<>(words);
    asked.replaceAll(word -> word.equals(STORE) ? folder.resolve(STORE).toString() : word);
    How how = TABLE.get(words.get(0));
    if (how == How.HELP_ONLY) {
      asked.add("--help");
    } else if (how == How.ON_A_STOPPED_NIGHT) {
      call(List.of("stop", "--store", folder.resolve(STORE).toString()));
    }
    Called called = call(asked);
    boolean nothingWaits = how == How.OR_NOTHING_WAITS && called.code() == 1;
    if (!nothingWaits) {
      assertEquals(0, called.code(), called.output());
    }
  }

  /**
   * What came of a call.
   *
   * @param code its exit code
   * @param output what it printed
   */
  private record Called(int code, String output) {}

  private static Called call(List<String> words) throws IOException, InterruptedException {
    List<String> command = new ArrayList<>();
    command.add(Path.of(System.getProperty("java.home"), "bin", "java").toString());
    command.addAll(List.of("-XX:+UseSerialGC", "-XX:TieredStopAtLevel=1", "-Xshare:auto"));
    command.addAll(List.of("-cp", System.getProperty("java.class.path")));
    command.add("beamwarden.command.Main");
    command.addAll(words);
    Path output = folder.resolve("output");
    Process process =
        new ProcessBuilder(command)
            .directory(Repository.ROOT.toFile())
            .redirectErrorStream(true)
            .redirectOutput(output.toFile())
            .start();
    if (!process.waitFor(2, TimeUnit.MINUTES)) {
      process.destroyForcibly();
      throw new AssertionError("it did not end: " + words);
    }
    return new Called(process.exitValue(), Files.readString(output));
  }
}
