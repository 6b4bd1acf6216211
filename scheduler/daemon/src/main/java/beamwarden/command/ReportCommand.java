package beamwarden.command;

import beamwarden.answer.Json;
import beamwarden.answer.NightAnswer;
import beamwarden.ledger.Books;
import beamwarden.profile.Profile;
import beamwarden.report.Night;
import beamwarden.report.NightReport;
import beamwarden.report.NightReports;
import beamwarden.report.Pages;
import beamwarden.shift.ShiftCalendar;
import java.time.DateTimeException;
import java.time.Instant;
import java.time.LocalDate;
import java.util.Optional;
import picocli.CommandLine.Command;
import picocli.CommandLine.Parameters;

/** Shows the report of a night. */
@Command(
    name = "report",
    description = "Show what was done in a night, at what dose, and what was not done and why.")
final class ReportCommand extends ReadingCommand {
  @Parameters(
      paramLabel = "NIGHT",
      arity = "0..1",
      description = "The date on which it opened, such as 2031-03-12; the last one without it.")
  private String night;

  ReportCommand(Surroundings surroundings) {
    super(surroundings);
  }

  @Override
  String path() {
    return night == null ? "/api/v1/report" : "/api/v1/report?night=" + encoded(date().toString());
  }

  @Override
  void fromStore(Workshop.Shelf shelf) {
    if (shelf.entries().isEmpty()) {
      throw new CommandFailure(ExitCode.NO, "this store has no entries, so there is no night");
    }
    Instant last = Books.of(shelf.entries()).lastAt();
    Profile profile = shelf.profile();
    NightReport report =
        new NightReports(profile.abilities().instrument(), profile.zone())
            .of(night(profile, last), shelf.entries(), Optional.empty(), last);
    surroundings().answer(json() ? Json.lines(NightAnswer.of(report)) : Pages.night(report));
  }

  private Night night(Profile profile, Instant last) {
    ShiftCalendar calendar =
        new ShiftCalendar(profile.zone(), profile.shifts(), profile.windDown());
    Optional<Night> found =
        night == null
            ? Night.at(last, calendar, profile.zone())
            : Night.on(date(), calendar, profile.zone());
    return found.orElseThrow(
        () ->
            new CommandFailure(
                ExitCode.NO,
                night == null
                    ? "the profile has no shift, so there is no night"
                    : "no shift opens on " + night + "; a night is named by that date"));
  }

  private LocalDate date() {
    try {
      return LocalDate.parse(night);
    } catch (DateTimeException none) {
      throw new CommandFailure(
          ExitCode.USAGE, night + " is no date; write 2031-03-12, the day the night opened", none);
    }
  }
}
