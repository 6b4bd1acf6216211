package beamwarden.report;

import beamwarden.quantity.Current;
import java.nio.file.Path;
import java.time.ZoneId;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.Collectors;

/** A night report as a page of plain text. */
final class NightPage {
  private final NightReport report;
  private final ZoneId zone;
  private final Page page = new Page();

  private NightPage(NightReport report) {
    this.report = report;
    this.zone = report.zone();
  }

  static String of(NightReport report) {
    NightPage page = new NightPage(report);
    page.top();
    page.jobs();
    page.undone();
    page.samples();
    page.events();
    page.presumed();
    page.readings();
    page.files();
    return page.page.print();
  }

  private void top() {
    page.title(
        "Night of "
            + report.night().date()
            + ", "
            + report.instrument()
            + ", times of "
            + zone.getId());
    String shifts =
        report.night().shifts().stream()
            .map(shift -> Texts.shift(shift, zone))
            .collect(Collectors.joining("; "));
    page.plain((report.night().shifts().size() == 1 ? "Shift " : "Shifts ") + shifts + ".");
  }

  private void jobs() {
    Table table =
        new Table("job", "state", "began", "ended", "exposures", "done", "charge", "highest");
    for (JobReport job : report.jobs()) {
      JobProgress progress = job.progress();
      table.row(
          progress.id(),
          progress.state().text(),
          began(progress),
          Texts.time(progress.ended(), zone),
          Integer.toString(progress.exposures()),
          Texts.percent(progress.doneFraction()),
          job.dose().charge().toString(),
          Texts.fluence(job.dose().highest()));
    }
    page.heading(report.jobs().isEmpty() ? "No jobs" : "Jobs").table(table);
  }

  private String began(JobProgress progress) {
    boolean before = progress.started().filter(report.night().from()::isAfter).isPresent();
    return before ? "earlier" : Texts.time(progress.started(), zone);
  }

  private void undone() {
    List<JobReport> undone = report.undone();
    if (!undone.isEmpty()) {
      page.heading("Not done, or not wholly");
    }
    for (JobReport job : undone) {
      String because = job.progress().because();
      page.marked(
          job.progress().id(),
          job.progress().state().text() + (because.isBlank() ? "" : ": " + because));
    }
  }

  private void samples() {
    for (SampleReport sample : report.samples()) {
      page.heading("Sample " + Pages.name(sample));
      Pages.sample(page, sample);
    }
  }

  private void events() {
    page.heading(report.events().isEmpty() ? "No faults" : "What happened besides");
    for (NightEvent event : report.events()) {
      page.marked(Texts.time(event.at(), zone), event.kind() + ": " + event.text());
    }
  }

  private void presumed() {
    if (!report.presumed().isEmpty()) {
      page.heading("Grants whose outcome is not known; they count in full");
    }
    for (GrantLine line : report.presumed()) {
      page.marked(
          Texts.time(line.openedAt(), zone),
          "grant " + line.grant() + " of " + line.job() + ": " + line.because());
    }
  }

  private void readings() {
    if (report.readings().isEmpty()) {
      return;
    }
    Table table = new Table("current reading", "set to", "read", "off by");
    for (NightReport.Reading reading : report.readings()) {
      Current wished = reading.reading().settings().current();
      Current read = reading.reading().current();
      double off = read.amperes() / wished.amperes() - 1;
      table.row(
          Texts.time(reading.at(), zone),
          wished.toString(),
          read.toString(),
          String.format(java.util.Locale.ROOT, "%+.1f %%", off * 100));
    }
    page.heading("Probe current").table(table);
  }

  private void files() {
    if (report.files().isEmpty()) {
      return;
    }
    long bytes = report.files().stream().mapToLong(file -> file.file().bytes()).sum();
    int count = report.files().size();
    String counted = count == 1 ? "1 file, " : count + " files, ";
    page.heading("Data: " + counted + Texts.bytes(bytes) + ", in");
    Map<String, Integer> byFolder = new LinkedHashMap<>();
    for (NightReport.File file : report.files()) {
      byFolder.merge(folder(file.file().path()), 1, Integer::sum);
    }
    byFolder.forEach((folder, held) -> page.text(folder + " (" + held + ")"));
  }

  private static String folder(String path) {
    Path parent = Path.of(path).getParent();
    return parent == null ? "." : parent.toString();
  }
}
