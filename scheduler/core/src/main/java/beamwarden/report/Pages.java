package beamwarden.report;

import beamwarden.beam.Conditions;
import beamwarden.plan.JobCheck;
import beamwarden.queue.JobState;
import java.time.ZoneId;
import java.util.List;
import java.util.OptionalDouble;

/** Renders reports as pages of plain text, at most 80 columns wide, times by the lab's clock. */
public final class Pages {
  private Pages() {}

  /** A night report. */
  public static String night(NightReport report) {
    return NightPage.of(report);
  }

  /**
   * What a check says of each job of a queue.
   *
   * @param queue the queue's name
   * @param instrument the instrument's name
   * @param checks what it says
   * @param zone the lab's time zone
   */
  public static String check(String queue, String instrument, List<JobCheck> checks, ZoneId zone) {
    return CheckPage.of(queue, instrument, checks, zone);
  }

  /** A sample's dose books. */
  public static String dose(DoseReport report) {
    Page page = new Page().title("Dose of " + name(report.sample()));
    page.heading("Caps, all nights together");
    sample(page, report.sample());
    page.heading("Grants");
    Table table = new Table("stored", "grant", "job", "pass", "state", "charge", "upper");
    for (GrantLine line : report.grants()) {
      table.row(
          Texts.moment(line.openedAt(), report.zone()),
          Long.toString(line.grant()),
          cut(line.job()),
          Integer.toString(line.counted().exposure().pass()),
          line.state().text(),
          line.counts() ? best(line) : "-",
          line.counts() ? upper(line) : "-");
    }
    page.table(table);
    if (report.grants().isEmpty()) {
      page.text("none");
    }
    return page.print();
  }

  private static String best(GrantLine line) {
    return line.counted().bestCurrent().chargeIn(line.counted().bestBeamOn()).toString();
  }

  private static String upper(GrantLine line) {
    return line.counted().upperCurrent().chargeIn(line.counted().upperBeamOn()).toString();
  }

  /** What goes on just now, and where the jobs stand. */
  public static String now(NightNow now, List<JobProgress> jobs) {
    ZoneId zone = now.zone();
    Page page =
        new Page()
            .title(now.instrument() + " at " + Texts.moment(now.now(), zone) + ", " + zone.getId());
    page.plain(
        "The instrument is "
            + now.state().text()
            + (now.because().isBlank() ? "." : ": " + now.because() + "."));
    now.running()
        .ifPresent(
            running ->
                page.plain(
                    "Exposing "
                        + running.job()
                        + ", grant "
                        + running.grant()
                        + ", pass "
                        + (running.pass() + 1)
                        + ": "
                        + Texts.percent((double) running.unitsDone() / running.units())
                        + " of this exposure."));
    page.plain(
        now.shift()
            .map(shift -> "Shift " + Texts.shift(shift, zone) + ".")
            .orElse("No shift is open."));
    now.next()
        .ifPresent(
            next -> page.plain("The next shift opens " + Texts.moment(next.opens(), zone) + "."));
    if (now.unconfirmed()) {
      page.plain("Holder and placements wait to be confirmed: approve placements.");
    }
    return jobs(page, jobs).print();
  }

  private static Page jobs(Page page, List<JobProgress> jobs) {
    Table table = new Table("job", "sample", "state", "exposures", "done");
    for (JobProgress job : jobs) {
      table.row(
          job.id(),
          cut(job.sample()),
          job.state().text(),
          Integer.toString(job.exposures()),
          Texts.percent(job.doneFraction()));
    }
    page.heading(jobs.isEmpty() ? "No jobs" : "Jobs").table(table);
    for (JobProgress job : jobs) {
      boolean reason = job.state() == JobState.HELD && !job.because().isBlank();
      if (reason) {
        page.marked(job.id(), job.because());
      }
    }
    return page;
  }

  /** The caps of a sample as a table. */
  static void sample(Page page, SampleReport sample) {
    Table table = new Table("cap", "limit", "booked", "upper", "left");
    for (CapReport cap : sample.caps()) {
      table.row(
          cap.kind() + cap.area().map(area -> " in " + area).orElse(""),
          Texts.value(cap.limit(), cap.unit()),
          value(cap.booked(), cap.unit()),
          value(cap.upper(), cap.unit()),
          Texts.value(cap.left(), cap.unit()));
    }
    page.table(table);
    page.text("charge received: " + sample.charge() + ", at most " + sample.upperCharge());
    if (sample.asksForApproval()) {
      page.text("a looser version of it was handed in and waits: approve " + sample.id());
    }
  }

  static String name(SampleReport sample) {
    return sample.label().isBlank() ? sample.id() : sample.id() + ", " + sample.label();
  }

  private static String value(OptionalDouble value, String unit) {
    return value.isPresent() ? Texts.value(value.getAsDouble(), unit) : "unknown";
  }

  /** A name in a narrow column; {@code panchromatic} and the like stay whole. */
  static String cut(String name) {
    int most = Math.max(Conditions.PANCHROMATIC.length(), 16);
    return name.length() <= most ? name : name.substring(0, most - 1) + "~";
  }
}
