package beamwarden.system;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.tngtech.archunit.core.domain.JavaClasses;
import com.tngtech.archunit.core.importer.ClassFileImporter;
import com.tngtech.archunit.lang.ArchRule;
import java.util.List;
import org.junit.jupiter.api.Test;

/** Each rule of {@link ArchitectureTest} finds what breaks it, in the package {@code bad}. */
class ArchitectureRulesTest {
  private static final String ROOT = "beamwarden.system.bad";

  private static final ArchitectureRules RULES = new ArchitectureRules(ROOT);

  private static final JavaClasses BAD = new ClassFileImporter().importPackages(ROOT);

  private static final PackageTable TABLE =
      new PackageTable(
          """
          adapters/left   | left  |      |
          scheduler/right | right | left |
          """);

  @Test
  void aCircleOfPackagesIsFound() {
    assertFinds(RULES.noPackageCycles(), "Cycle detected", "Slice left", "Slice right");
  }

  @Test
  void anImportThatNoRowAllowsIsFound() {
    assertFinds(
        RULES.importsOnlyWhatItsRowSays(TABLE.rows().get(0)),
        "bad.right.OtherHalf",
        "java.sql.SQLException",
        "tools.jackson.databind.json.JsonMapper");
  }

  @Test
  void anImportThatTheRowAllowsIsNone() {
    RULES.importsOnlyWhatItsRowSays(TABLE.rows().get(1)).check(BAD);
  }

  @Test
  void anAdapterThatKnowsTheSchedulerIsFound() {
    assertFinds(RULES.noneOfTheseImports(List.of("left"), List.of("right")), "bad.right.OtherHalf");
  }

  @Test
  void everyReadingOfTheSystemClockIsFound() {
    List<String> found =
        assertFinds(
            RULES.onlyTheseReadTheSystemClock(List.of("right")),
            "java.time.Instant.now()",
            "java.time.LocalDate.now(",
            "java.time.LocalDateTime.now(",
            "java.time.ZonedDateTime.now(",
            "java.time.Clock.systemUTC()",
            "java.time.Clock.system(",
            "java.time.InstantSource.system()",
            "java.lang.System.currentTimeMillis()",
            "java.lang.System.nanoTime()",
            "java.util.Date.<init>()",
            "ClockReader.later()");
    assertEquals(11, found.size(), found.toString());
  }

  @Test
  void everyUseOfAStandardStreamIsFound() {
    assertFinds(
        RULES.onlyTheseUseTheStandardStreams(List.of("right"), List.of("Circle")),
        "java.lang.System.out",
        "java.lang.System.err",
        "printStackTrace()");
  }

  @Test
  void aMainOfAProcessMayUseTheStandardStreams() {
    RULES.onlyTheseUseTheStandardStreams(List.of(), List.of("left.Shouter")).check(BAD);
  }

  @Test
  void everyGenericExceptionIsFoundAndNoOther() {
    List<String> found =
        assertFinds(
            ArchitectureRules.noGenericExceptionIsThrown(),
            "Thrower.exception(",
            "Thrower.runtimeException(",
            "Thrower.throwable(",
            "Thrower.error(");
    assertEquals(4, found.size(), found.toString());
  }

  @Test
  void aLibraryInAPublicSignatureIsFoundAndNoOther() {
    List<String> json =
        assertFinds(RULES.noSignatureShowsALibrary("jackson", List.of()), "mapper()", "mappers()");
    assertEquals(2, json.size(), json.toString());
    assertFinds(RULES.noSignatureShowsALibrary("jdbc", List.of()), "save", "SQLException");
  }

  @Test
  void aTableInWhichARowImportsWhatStandsBelowItIsRefused() {
    IllegalArgumentException refused =
        assertThrows(
            IllegalArgumentException.class,
            () -> new PackageTable("core | dose | ledger |\ncore | ledger | |"));
    assertEquals(
        "dose may import only what stands above it in the table, not [ledger]",
        refused.getMessage());
  }

  /** The rule's findings, of which each of {@code expected} is in one. */
  private static List<String> assertFinds(ArchRule rule, String... expected) {
    List<String> found = rule.evaluate(BAD).getFailureReport().getDetails();
    for (String each : expected) {
      assertTrue(
          found.stream().anyMatch(line -> line.contains(each)),
          () -> rule.getDescription() + " must find " + each + " but finds " + found);
    }
    return found;
  }
}
