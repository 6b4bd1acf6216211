package beamwarden.system;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.tngtech.archunit.core.domain.JavaClass;
import com.tngtech.archunit.core.domain.JavaClasses;
import com.tngtech.archunit.core.importer.ClassFileImporter;
import com.tngtech.archunit.core.importer.ImportOption;
import java.util.List;
import java.util.Set;
import java.util.TreeSet;
import java.util.function.Predicate;
import java.util.stream.Collectors;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.MethodSource;

/**
 * The rules of the architecture, held against every class of the program; {@link
 * ArchitectureRulesTest} shows that each of them can fail.
 *
 * <p>Before you widen a row, think hard: what a package does not know cannot break it.
 */
class ArchitectureTest {
  /**
   * Module | package | which of ours it may import, all of them above it | which libraries. The JDK
   * is free to all, its databases apart. Each package-info says the same.
   */
  private static final PackageTable TABLE =
      new PackageTable(
          """
          adapters/contract  | quantity   |                                             |
          adapters/contract  | beam       | quantity                                    |
          adapters/contract  | timing     |                                             |
          adapters/contract  | instrument | beam quantity timing                        |
          adapters/bridge    | bridge     | instrument beam quantity timing             | jackson slf4j
          adapters/simulated | simulated  | instrument beam quantity timing             | slf4j
          adapters/kit       | kit        | instrument beam quantity timing             | junit
          scheduler/core     | physics    | quantity                                    |
          scheduler/core     | shift      |                                             |
          scheduler/core     | profile    | shift instrument                            |
          scheduler/core     | queue      | beam quantity                               |
          scheduler/core     | dose       | physics queue instrument beam quantity      |
          scheduler/core     | ledger     | dose queue instrument beam quantity timing  |
          scheduler/core     | estimate   | dose physics profile queue \
                                            instrument beam quantity                    |
          scheduler/core     | plan       | estimate ledger dose queue shift instrument \
                                            beam quantity                               |
          scheduler/core     | run        | plan estimate ledger dose profile queue shift \
                                            instrument beam quantity timing             | slf4j
          scheduler/core     | report     | run plan estimate ledger dose profile queue shift \
                                            instrument beam quantity                    |
          scheduler/daemon   | document   | profile queue shift physics \
                                            instrument beam quantity                    | commons-text snakeyaml
          scheduler/daemon   | store      | bridge ledger queue                         | jackson jdbc slf4j
          scheduler/daemon   | clockwork  | timing                                      | quartz slf4j
          scheduler/daemon   | answer     | document report run plan ledger dose queue shift \
                                            instrument beam quantity                    | jackson
          scheduler/daemon   | web.api    | answer document report run plan ledger profile queue \
                                            shift instrument                            | jackson
          scheduler/daemon   | web.stream | web.api answer run ledger                   | slf4j
          scheduler/daemon   | web        | web.api web.stream answer run ledger        | undertow slf4j
          scheduler/daemon   | command    | answer document \
                                            report run plan estimate ledger dose physics profile \
                                            queue shift instrument beam quantity timing | picocli slf4j
          scheduler/daemon   | wiring     | command web web.api web.stream answer document \
                                            clockwork store report run plan estimate ledger dose \
                                            physics profile queue shift bridge \
                                            instrument beam quantity timing             | jackson slf4j
          """);

  private static final ArchitectureRules RULES = new ArchitectureRules("beamwarden");

  /** Fewer than there are, so that nobody has to keep count; an empty scan passes any rule. */
  private static final int FEWEST_CLASSES = 300;

  private static final JavaClasses CLASSES =
      new ClassFileImporter()
          .withImportOption(ImportOption.Predefined.DO_NOT_INCLUDE_TESTS)
          .importPackages("beamwarden");

  @Test
  void theWholeProgramWasScanned() {
    assertTrue(CLASSES.size() >= FEWEST_CLASSES, "only " + CLASSES.size() + " classes");
  }

  @Test
  void theTableNamesEveryPackageAndNoOther() {
    Set<String> packages =
        CLASSES.stream()
            .filter(type -> !type.getSimpleName().equals("package-info"))
            .map(JavaClass::getPackageName)
            .map(name -> name.substring("beamwarden.".length()))
            .collect(Collectors.toCollection(TreeSet::new));
    assertEquals(new TreeSet<>(TABLE.names()), packages);
  }

  @Test
  void noPackagesImportEachOtherInACircle() {
    RULES.noPackageCycles().check(CLASSES);
  }

  @ParameterizedTest
  @MethodSource("rows")
  void aPackageImportsOnlyWhatItsRowSays(PackageTable.Row row) {
    RULES.importsOnlyWhatItsRowSays(row).check(CLASSES);
  }

  @ParameterizedTest
  @MethodSource("rows")
  void aPackageInfoSaysWhatItsRowSays(PackageTable.Row row) {
    Set<String> others = new TreeSet<>(TABLE.names());
    others.remove(row.name());
    assertEquals(row.imports(), PackageInfo.of(row).imports(others));
  }

  static List<PackageTable.Row> rows() {
    return TABLE.rows();
  }

  @Test
  void noAdapterImportsTheScheduler() {
    RULES
        .noneOfTheseImports(
            named(PackageTable.Row::isAdapter), named(row -> row.module().startsWith("scheduler/")))
        .check(CLASSES);
  }

  @Test
  void theSchedulerImportsNoAdapterButTheBridge() {
    RULES
        .noneOfTheseImports(
            named(row -> row.module().startsWith("scheduler/")),
            named(row -> row.isAdapter() && !row.name().equals("bridge")))
        .check(CLASSES);
  }

  private static List<String> named(Predicate<PackageTable.Row> which) {
    return TABLE.rows().stream().filter(which).map(PackageTable.Row::name).toList();
  }

  @Test
  void onlyTimingAndWiringReadTheSystemClock() {
    RULES.onlyTheseReadTheSystemClock(List.of("timing", "wiring")).check(CLASSES);
  }

  /** A host's standard output is the wire on which it answers. */
  @Test
  void onlyCommandsAndTheMainsOfProcessesUseTheStandardStreams() {
    RULES
        .onlyTheseUseTheStandardStreams(List.of("command"), List.of("bridge.HostMain"))
        .check(CLASSES);
  }

  @Test
  void noGenericExceptionIsThrown() {
    ArchitectureRules.noGenericExceptionIsThrown().check(CLASSES);
  }

  @ParameterizedTest
  @CsvSource({
    "jackson, bridge answer",
    "jdbc, store",
    "quartz, clockwork",
    "undertow, web",
    "picocli, command",
    "snakeyaml, document",
    "commons-text, document"
  })
  void noSignatureShowsALibraryOutsideItsOwnPackages(String library, String own) {
    RULES.noSignatureShowsALibrary(library, List.of(own.split(" "))).check(CLASSES);
  }
}
