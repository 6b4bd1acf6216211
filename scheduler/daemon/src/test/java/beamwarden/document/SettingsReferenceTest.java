package beamwarden.document;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.Mode;
import beamwarden.profile.Profile;
import java.io.IOException;
import java.lang.reflect.Field;
import java.lang.reflect.Modifier;
import java.net.URISyntaxException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.HashSet;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Set;
import java.util.TreeMap;
import java.util.TreeSet;
import java.util.regex.Pattern;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * Holds {@code ops/settings.md} against the readers: every group of keys has a section of its name,
 * whose entries are the keys that the group may have, all of them and no other.
 */
class SettingsReferenceTest {
  /** The union of all regions, by which is found out which of them is meant. */
  private static final String ANY_REGION = "a region";

  /** Fewer than there are: a look that finds nothing would pass any test. */
  private static final int FEWEST_GROUPS = 20;

  private static final Pattern WITHOUT_IT =
      Pattern.compile("\\*Default: |[Mm]ust be given|\\*Refused");

  private final SettingsPage page = SettingsPage.read();
  private final Map<String, Set<Keys>> groups = groups();

  @Test
  void theKeysOfTheReadersAreFound() {
    assertTrue(groups.size() >= FEWEST_GROUPS, "only " + groups.keySet());
  }

  @Test
  void everyKeyThatAReaderKnowsIsDocumentedAndNoOther() {
    StringBuilder known = new StringBuilder();
    StringBuilder documented = new StringBuilder();
    groups.forEach(
        (of, keys) -> {
          known.append(of).append(": ").append(names(keys)).append('\n');
          Set<String> entries = page.sections().getOrDefault(of, Map.of()).keySet();
          documented.append(of).append(": ").append(entries).append('\n');
        });
    assertEquals(known.toString(), documented.toString());
  }

  @Test
  void everyKeyThatIsNotRunIsCalledRefused() {
    groups.forEach(
        (of, all) -> all.forEach(keys -> keys.notRun().keySet().forEach(key -> refused(of, key))));
    AcquisitionReader.NOT_RUN.keySet().forEach(key -> refused("a job", key));
  }

  private void refused(String of, String key) {
    String entry = page.sections().get(of).get(key);
    assertTrue(entry.toLowerCase(Locale.ROOT).contains("*refused"), of + ": " + key);
  }

  @Test
  void everyEntrySaysWhatHoldsWithoutIt() {
    groups
        .keySet()
        .forEach(
            of ->
                page.sections()
                    .get(of)
                    .forEach(
                        (key, entry) ->
                            assertTrue(WITHOUT_IT.matcher(entry).find(), of + ": " + key)));
  }

  @Test
  void theModesThatAreRunAndThoseThatAreRefusedAreNamed() {
    String entry = page.sections().get("a job").get("mode");
    String[] runAndRefused = entry.split("The modes ", 2);
    for (Mode mode : Mode.values()) {
      boolean run = AcquisitionReader.runModes().contains(mode.text());
      String part = runAndRefused[run ? 0 : 1];
      assertTrue(part.contains("`" + mode.text() + "`"), mode.text());
    }
  }

  @Test
  void theChangesThatAreKnownAreNamed() {
    String entry = page.sections().get("a profile").get("changes");
    String known = adviceFor("changes: { nothing-like-it: attended }", "nothing-like-it");
    for (String change : known.replace("write ", "").split(", | or ", -1)) {
      assertTrue(entry.contains("`" + change + "`"), change + " in " + entry);
    }
  }

  /** What a profile with that key is advised to write instead of a word. */
  private static String adviceFor(String key, String word) {
    Reading<Profile> reading = ProfileDocuments.read("p.yaml", key + "\n");
    return reading.problems().stream()
        .filter(problem -> problem.message().contains(word))
        .map(Problem::advice)
        .findFirst()
        .orElseThrow();
  }

  /** Each limit stands on the page in the row or the entry that is about it. */
  @ParameterizedTest
  @CsvSource({
    "BYTES, a document",
    "NODES, a document",
    "NESTING, a document",
    "ALIASES, a document",
    "PROBLEMS, problems listed",
    "PASSES, a job",
    "ID_CHARACTERS, an id or a name",
    "TEXT_CHARACTERS, an id or a name"
  })
  void theLimitsOfADocumentAreThoseOfTheReaders(String limit, String row) {
    String line =
        page.text().lines().filter(one -> one.startsWith("| " + row)).findFirst().orElseThrow();
    assertTrue(words(line).contains(value(limit)), line);
  }

  @ParameterizedTest
  @CsvSource({
    "PIXELS, a job, pixels",
    "FRAMES, a job, frames",
    "TILES, a mosaic, mosaic",
    "COINCIDENCES, until, coincidences",
    "SHIFTS, a profile, shifts",
    "RETRIES, a profile, retries"
  })
  void theLimitsOfAKeyAreThoseOfItsReader(String limit, String of, String key) {
    String entry = page.sections().get(of).get(key);
    assertTrue(words(entry).contains(value(limit)), entry);
  }

  private static List<String> words(String text) {
    return Arrays.asList(text.split("[^0-9A-Za-z]+", -1));
  }

  private static String value(String limit) {
    try {
      return String.valueOf(Limits.class.getDeclaredField(limit).get(null));
    } catch (ReflectiveOperationException renamed) {
      throw new IllegalStateException(renamed);
    }
  }

  private static Set<String> names(Set<Keys> groups) {
    return groups.stream()
        .flatMap(keys -> Stream.of(keys.used(), keys.notRun().keySet(), keys.accepted()))
        .flatMap(some -> some.stream())
        .collect(Collectors.toCollection(TreeSet::new));
  }

  /** The groups by what they are, such as {@code a job}: the constants of all readers. */
  private static Map<String, Set<Keys>> groups() {
    Map<String, Set<Keys>> groups = new TreeMap<>();
    for (Class<?> reader : readers()) {
      for (Field field : reader.getDeclaredFields()) {
        if (field.getType() == Keys.class && Modifier.isStatic(field.getModifiers())) {
          Keys keys = keys(field);
          groups.computeIfAbsent(keys.of(), unseen -> new HashSet<>()).add(keys);
        }
      }
    }
    groups.remove(ANY_REGION);
    return groups;
  }

  private static Keys keys(Field constant) {
    try {
      constant.setAccessible(true);
      return (Keys) constant.get(null);
    } catch (IllegalAccessException impossible) {
      throw new IllegalStateException(impossible);
    }
  }

  private static List<Class<?>> readers() {
    try {
      Path root = Path.of(Keys.class.getProtectionDomain().getCodeSource().getLocation().toURI());
      try (Stream<Path> files = Files.list(root.resolve("beamwarden/document"))) {
        return files
            .map(file -> file.getFileName().toString())
            .filter(name -> name.endsWith("Reader.class") || name.equals("Recipes.class"))
            .sorted()
            .<Class<?>>map(name -> named("beamwarden.document." + name.split("\\.", -1)[0]))
            .toList();
      }
    } catch (IOException | URISyntaxException failure) {
      throw new IllegalStateException("the readers cannot be listed", failure);
    }
  }

  private static Class<?> named(String name) {
    try {
      return Class.forName(name);
    } catch (ClassNotFoundException impossible) {
      throw new IllegalStateException(impossible);
    }
  }
}
