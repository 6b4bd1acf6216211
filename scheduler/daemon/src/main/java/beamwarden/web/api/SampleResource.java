package beamwarden.web.api;

import beamwarden.answer.DoseAnswer;
import beamwarden.answer.SampleAnswer;
import beamwarden.report.DoseReport;
import beamwarden.report.Pages;
import beamwarden.report.SampleReport;
import beamwarden.run.Desk;
import beamwarden.run.RunState;
import java.util.List;
import java.util.Map;

/** Samples and their dose. */
final class SampleResource {
  private final Desk desk;
  private final Views views;

  SampleResource(Desk desk, Views views) {
    this.desk = desk;
    this.views = views;
  }

  List<Route> routes() {
    return List.of(
        new Route("GET", "/api/v1/samples", (request, name) -> list()),
        new Route("GET", "/api/v1/samples/*/dose", this::dose));
  }

  private Reply list() {
    return Reply.json(
        Map.of(
            "samples",
            desk.state().books().samples().stream()
                .map(record -> SampleAnswer.of(SampleReport.of(record)))
                .toList()));
  }

  private Reply dose(Request request, String sample) {
    RunState state = desk.state();
    DoseReport report =
        DoseReport.of(sample, state.books(), views.entries(state), desk.setup().profile().zone())
            .orElseThrow(
                () ->
                    Refusal.of(
                        RefusalKind.NOT_FOUND,
                        "there is no sample " + sample + "; /api/v1/samples lists the samples"));
    return request.wantsText() ? Reply.text(Pages.dose(report)) : Reply.json(DoseAnswer.of(report));
  }
}
