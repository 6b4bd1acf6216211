package beamwarden.system;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.api.Assumptions.assumeTrue;

import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.TreeSet;
import java.util.function.Predicate;
import java.util.regex.Pattern;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;

/** What keeps the repository tidy and no other tool looks at. */
class TidyTest {
  private static final Set<String> TOP_LEVEL =
      Set.of(
          "README.md",
          "DEVELOPERS.md",
          "pom.xml",
          "scheduler",
          "adapters",
          "queue-examples",
          "ops");

  private static final Pattern SOURCE = Pattern.compile("\\.(java|sql)$");

  private static final int MOST_LINES = 450;

  /** Written in two pieces, so that this file does not find itself. */
  private static final Pattern LEFT_OVER =
      Pattern.compile("\\b(TO" + "DO|FIX" + "ME|XX" + "X|HA" + "CK|TB" + "D)\\b");

  private static final Pattern SWITCHED_OFF = Pattern.compile("@(Dis" + "abled|Ig" + "nore)\\b");

  /** Places on somebody's own machine. */
  private static final Pattern MACHINE_PATH =
      Pattern.compile("(?<![\\w.}~-])/(wo" + "rk|ro" + "ot|home/\\w+|Users/\\w+|tmp/w" + "t)/");

  private static final Pattern ADDRESS = Pattern.compile("https?://([A-Za-z0-9.-]+)");

  /** Whom the project may name: what formats are called by, this machine, and nobody at all. */
  private static final Pattern KNOWN_HOST =
      Pattern.compile(
          "(www\\.w3\\.org|maven\\.apache\\.org|www\\.apache\\.org|www\\.jsonrpc\\.org"
              + "|json-schema\\.org|127\\.0\\.0\\.1|localhost|(.+\\.)?example(\\.(org|com))?)\\.?");

  private static final Pattern VAGUE_NAME = Pattern.compile("\\w+(Manager|Helper|Utils?|Impl)");

  private static final List<Path> FILES = Repository.files();

  @Test
  void theTopLevelHoldsWhatItMayHold() {
    Set<String> visible =
        FILES.stream()
            .map(path -> path.getName(0).toString())
            .filter(name -> !name.startsWith("."))
            .collect(Collectors.toCollection(TreeSet::new));
    assertEquals(new TreeSet<>(TOP_LEVEL), visible);
  }

  @Test
  void everyPackageSaysInASentenceWhatItIsFor() {
    Set<Path> packages =
        named(".java").map(Path::getParent).collect(Collectors.toCollection(TreeSet::new));
    packages.removeIf(TidyTest::isTestOfAPackage);
    assertTrue(packages.size() > 20, packages.toString());
    assertNone(packages.stream().filter(folder -> !saysWhatItIsFor(folder)));
  }

  /** Tests share the package of what they test, and its package-info. */
  private static boolean isTestOfAPackage(Path folder) {
    Path inMain = Path.of(folder.toString().replace("src/test/java", "src/main/java"));
    return !inMain.equals(folder) && FILES.contains(inMain.resolve("package-info.java"));
  }

  private static boolean saysWhatItIsFor(Path folder) {
    Path info = folder.resolve("package-info.java");
    return FILES.contains(info)
        && PackageInfo.of(Repository.ROOT.resolve(info)).text().matches("[A-Z].{20,}\\..*");
  }

  @Test
  void noPackageIsEmptyButForItsDescription() {
    assertNone(
        named("package-info.java")
            .filter(
                info ->
                    FILES.stream()
                        .noneMatch(
                            file ->
                                file.getParent() != null
                                    && file.getParent().startsWith(info.getParent())
                                    && !file.equals(info))));
  }

  @Test
  void everyPageHasOneTitle() {
    assertNone(named(".md").filter(page -> titles(page) != 1));
  }

  private static long titles(Path page) {
    String prose = Pattern.compile("(?ms)^```.*?^```").matcher(text(page)).replaceAll("");
    return prose.lines().filter(line -> line.startsWith("# ")).count();
  }

  @Test
  void nothingIsLeftToDo() {
    assertNone(FILES.stream().filter(finds(LEFT_OVER)));
  }

  @Test
  void noTestIsSwitchedOff() {
    assertNone(named(".java").filter(finds(SWITCHED_OFF)));
  }

  @Test
  void noSourceIsTooLongToRead() {
    assertNone(
        FILES.stream()
            .filter(file -> SOURCE.matcher(file.toString()).find() || isProgram(file))
            .filter(file -> text(file).lines().count() > MOST_LINES));
  }

  @Test
  void noTypeHasAVagueName() {
    assertNone(
        named(".java")
            .filter(
                file ->
                    VAGUE_NAME
                        .matcher(file.getFileName().toString().replace(".java", ""))
                        .matches()));
  }

  @Test
  void everyQueueExampleIsNamedInItsReadme() {
    String readme = text(Path.of("queue-examples/README.md"));
    assertNone(
        FILES.stream()
            .filter(file -> file.startsWith("queue-examples"))
            .filter(file -> !file.endsWith("README.md"))
            .filter(file -> !readme.contains("`" + file.getFileName() + "`")));
  }

  @Test
  void whatIsToBeRunSaysByWhatAndMayBeRun() {
    Optional<List<Path>> programs = Repository.programs();
    assumeTrue(programs.isPresent(), "skipped: git is not there to say what may be run");
    Set<Path> withFirstLine =
        FILES.stream().filter(TidyTest::isProgram).collect(Collectors.toCollection(TreeSet::new));
    assertTrue(withFirstLine.contains(Path.of(".ci/run")), withFirstLine.toString());
    assertEquals(withFirstLine, new TreeSet<>(programs.get()));
    assertNone(
        FILES.stream()
            .filter(file -> file.startsWith("ops") || file.startsWith(".ci"))
            .filter(file -> !file.getFileName().toString().contains("."))
            .filter(file -> !withFirstLine.contains(file)));
  }

  private static boolean isProgram(Path file) {
    return text(file).startsWith("#!");
  }

  @Test
  void noMachineOfOursIsNamed() {
    assertNone(FILES.stream().filter(finds(MACHINE_PATH)));
  }

  @Test
  void noHostIsNamedButThoseEverybodyKnows() {
    assertNone(
        FILES.stream()
            .flatMap(
                file ->
                    ADDRESS
                        .matcher(text(file))
                        .results()
                        .map(found -> found.group(1))
                        .filter(host -> !KNOWN_HOST.matcher(host).matches())
                        .map(host -> file + ": " + host)));
  }

  private static Predicate<Path> finds(Pattern pattern) {
    return file -> pattern.matcher(text(file)).find();
  }

  private static Stream<Path> named(String ending) {
    return FILES.stream().filter(file -> file.toString().endsWith(ending));
  }

  private static String text(Path file) {
    return Repository.read(Repository.ROOT.resolve(file));
  }

  private static void assertNone(Stream<?> found) {
    assertEquals(List.of(), found.map(Object::toString).sorted().toList());
  }
}
