package beamwarden.report;

import beamwarden.dose.LocalFluence;
import beamwarden.plan.Advice;
import beamwarden.plan.JobCheck;
import beamwarden.plan.Walk;
import java.time.ZoneId;
import java.util.List;
import java.util.Optional;

/** A check as a page of plain text. */
final class CheckPage {
  private CheckPage() {}

  static String of(String queue, String instrument, List<JobCheck> checks, ZoneId zone) {
    Page page =
        new Page().title("Check of " + queue + " on " + instrument + ", times of " + zone.getId());
    page.heading("Time").table(times(checks, zone));
    page.heading("Dose, each job alone").table(doses(checks));
    boolean reasons = checks.stream().anyMatch(check -> !check.why().isBlank());
    if (reasons) {
      page.heading("What does not fit, or not whole");
    }
    checks.stream().filter(check -> !check.why().isBlank()).forEach(check -> why(page, check));
    return page.print();
  }

  private static Table times(List<JobCheck> checks, ZoneId zone) {
    Table table = new Table("job", "verdict", "begins", "ends", "takes", "exposures");
    for (JobCheck check : checks) {
      Optional<Walk.Visit> visit = check.visit();
      table.row(
          check.job().id(),
          check.verdict().text(),
          visit.map(found -> Texts.day(found.starts(), zone)).orElse("-"),
          visit.map(found -> Texts.day(found.ends(), zone)).orElse("-"),
          visit.map(found -> Texts.duration(found.setUp().plus(found.exposing()))).orElse("-"),
          visit.map(found -> Integer.toString(found.exposures())).orElse("-"));
    }
    return table;
  }

  private static Table doses(List<JobCheck> checks) {
    Table table = new Table("job", "charge", "mean", "highest", "upper");
    for (JobCheck check : checks) {
      table.row(
          check.job().id(),
          check.dose().best().toString(),
          Texts.fluence(Optional.of(check.dose().mean())),
          Texts.fluence(check.dose().highest().map(LocalFluence::fluence)),
          Texts.fluence(check.dose().highestUpper().map(LocalFluence::fluence)));
    }
    return table;
  }

  private static void why(Page page, JobCheck check) {
    page.marked(check.job().id(), check.verdict().text() + ": " + check.why());
    Advice.of(check).forEach(advice -> page.marked("  advice", advice));
  }
}
