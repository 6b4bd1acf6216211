package beamwarden.command;

import beamwarden.answer.DoseAnswer;
import beamwarden.answer.Json;
import beamwarden.ledger.Books;
import beamwarden.report.DoseReport;
import beamwarden.report.Pages;
import picocli.CommandLine.Command;
import picocli.CommandLine.Parameters;

/** Shows what a sample has received. */
@Command(name = "dose", description = "Show what a sample has received, and what its caps leave.")
final class DoseCommand extends ReadingCommand {
  @Parameters(paramLabel = "SAMPLE", description = "The sample's id.")
  private String sample;

  DoseCommand(Surroundings surroundings) {
    super(surroundings);
  }

  @Override
  String path() {
    return "/api/v1/samples/" + encoded(sample) + "/dose";
  }

  @Override
  void fromStore(Workshop.Shelf shelf) {
    DoseReport report =
        DoseReport.of(sample, Books.of(shelf.entries()), shelf.entries(), shelf.profile().zone())
            .orElseThrow(
                () ->
                    new CommandFailure(
                        ExitCode.NO, "there is no sample " + sample + " in this store"));
    surroundings().answer(json() ? Json.lines(DoseAnswer.of(report)) : Pages.dose(report));
  }
}
