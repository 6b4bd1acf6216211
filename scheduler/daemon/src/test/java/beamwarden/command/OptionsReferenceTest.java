package beamwarden.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.document.SettingsPage;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeSet;
import java.util.regex.MatchResult;
import java.util.regex.Pattern;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Holds {@code ops/settings.md} against what each command's help says that it takes. */
class OptionsReferenceTest {
  private static final String EVERY_COMMAND = "every command";
  private static final String TO_A_DAEMON = "commands to a daemon";
  private static final Set<String> BY_THEMSELVES = Set.of("check", "rehearse", "serve");
  private static final Map<String, String> TOGETHER =
      Map.of(
          "hold", "hold, release, withdraw",
          "release", "hold, release, withdraw",
          "withdraw", "hold, release, withdraw");

  private static final Pattern COMMAND = Pattern.compile("(?m)^  ([a-z]+) ");
  private static final Pattern OPTION = Pattern.compile("(?m)^  (?:-h, |    )(--[a-z-]+)");
  private static final Pattern USUAL =
      Pattern.compile("(?m)^ +(--[a-z-]+)[^\n]*(?:\n {20,}[^\n]*)*?\\(([a-z0-9]+)\\)\\.");

  private final SettingsPage page = SettingsPage.read();

  private static String help(String... words) {
    return new Called.Caller()
        .call(Stream.concat(Stream.of(words), Stream.of("--help")).toArray())
        .out();
  }

  static List<String> commands() {
    return COMMAND.matcher(help()).results().map(command -> command.group(1)).toList();
  }

  @Test
  void theCommandsAreFound() {
    assertEquals(12, commands().size(), commands().toString());
  }

  @ParameterizedTest
  @MethodSource("commands")
  void everyOptionOfACommandIsDocumentedAndNoOther(String command) {
    Set<String> taken =
        OPTION
            .matcher(help(command))
            .results()
            .map(option -> option.group(1))
            .collect(Collectors.toCollection(TreeSet::new));
    Set<String> documented = new TreeSet<>(entries(EVERY_COMMAND).keySet());
    documented.remove("-h");
    documented.addAll(entries(section(command)).keySet());
    if (!BY_THEMSELVES.contains(command)) {
      documented.addAll(entries(TO_A_DAEMON).keySet());
    }
    assertEquals(taken, documented);
  }

  @ParameterizedTest
  @MethodSource("commands")
  void whatIsUsualIsDocumentedAsTheHelpSaysIt(String command) {
    for (MatchResult option : USUAL.matcher(help(command)).results().toList()) {
      String entry = entries(section(command)).get(option.group(1));
      assertTrue(entry.contains("*Default: " + option.group(2) + ".*"), option.group());
    }
  }

  private static String section(String command) {
    return TOGETHER.getOrDefault(command, command);
  }

  private Map<String, String> entries(String section) {
    Map<String, String> entries = page.sections().get(section);
    assertTrue(entries != null, "no section " + section);
    return entries;
  }
}
