package beamwarden.bridge;

import static java.nio.charset.StandardCharsets.UTF_8;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.timing.TimeAnchor;
import java.io.ByteArrayOutputStream;
import java.io.InputStream;
import java.io.PrintStream;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** What a host says to a wrong command line, without a process of its own. */
class HostRunTest {
  @TempDir private Path folder;
  private final ByteArrayOutputStream complaints = new ByteArrayOutputStream();

  private int run(List<String> words) {
    return new HostRun(
            InputStream.nullInputStream(),
            new ByteArrayOutputStream(),
            new PrintStream(complaints, true, UTF_8))
        .run(words);
  }

  private void complained(String sentence) {
    String said = complaints.toString(UTF_8);
    assertTrue(said.startsWith("beamwarden host: " + sentence), said);
    assertEquals(1, said.lines().count());
  }

  @ParameterizedTest
  @CsvSource(
      delimiter = '|',
      value = {
        "--tcp|--adapter is missing",
        "--adapter fake --folder f|say either --tcp or --streams",
        "--adapter fake --tcp --streams|say either --tcp or --streams",
        "--adapter|'--adapter' is unknown or lacks its value",
        "--loud|'--loud' is unknown or lacks its value",
        "--adapter fake --folder f --settings s --idle soon --tcp|Text cannot be parsed"
      })
  void refusesAWrongCommandLine(String words, String sentence) {
    assertEquals(2, run(List.of(words.split(" "))));
    complained(sentence);
  }

  @Test
  void readsTheCommandLineThatItWrites() {
    HostArguments arguments =
        new HostArguments(
            "simulated",
            Path.of("/var/lib/north room"),
            Path.of("/var/lib/north room/settings.json"),
            Duration.ofMinutes(3),
            true);
    assertEquals(arguments, HostArguments.parse(arguments.toList()));
  }

  @Test
  void saysThatSettingsAreMissing() {
    assertEquals(
        3,
        run(
            List.of(
                "--adapter",
                "fake",
                "--folder",
                folder.toString(),
                "--settings",
                folder.resolve("none").toString(),
                "--streams")));
    complained(folder.resolve("none").toString());
  }

  @Test
  void saysWhatIsWrongWithSettings() throws Exception {
    Path settings = Files.writeString(folder.resolve("settings.json"), "{\"options\":{}}");
    assertEquals(
        2,
        run(
            List.of(
                "--adapter",
                "fake",
                "--folder",
                folder.toString(),
                "--settings",
                settings.toString(),
                "--streams")));
    complained(settings + " holds no settings: Missing required creator property 'abilities'");
  }

  @Test
  void saysWhyAnAdapterDoesNotOpen() throws Exception {
    Path settings = folder.resolve("settings.json");
    Files.write(
        settings,
        ContractJson.mapper()
            .writeValueAsBytes(
                new HostSettings(Examples.ABILITIES, Map.of("broken", "yes"), TimeAnchor.real())));
    assertEquals(
        3,
        run(
            List.of(
                "--adapter",
                "fake",
                "--folder",
                folder.toString(),
                "--settings",
                settings.toString(),
                "--tcp")));
    complained("the adapter failed: the column does not answer");
  }

  @Test
  void saysThatThereIsNoSuchAdapter() {
    assertEquals(
        2,
        run(
            List.of(
                "--adapter",
                "nobody",
                "--folder",
                folder.toString(),
                "--settings",
                "s",
                "--streams")));
    complained("there is no adapter called 'nobody'");
  }
}
