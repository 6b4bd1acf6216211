package beamwarden.web.api;

import beamwarden.answer.NightAnswer;
import beamwarden.answer.NowAnswer;
import beamwarden.instrument.StopWhen;
import beamwarden.profile.Profile;
import beamwarden.report.Night;
import beamwarden.report.NightReport;
import beamwarden.report.NightReports;
import beamwarden.report.Pages;
import beamwarden.run.Desk;
import beamwarden.run.Event;
import beamwarden.run.RunState;
import beamwarden.shift.ShiftCalendar;
import com.fasterxml.jackson.annotation.JsonProperty;
import java.time.DateTimeException;
import java.time.LocalDate;
import java.time.ZoneId;
import java.util.List;
import java.util.Optional;

/** The night: what goes on, its report, stopping it, and approvals. */
final class NightResource {
  private final Desk desk;
  private final Wishes wishes;
  private final Views views;

  NightResource(Desk desk, Wishes wishes, Views views) {
    this.desk = desk;
    this.wishes = wishes;
    this.views = views;
  }

  /**
   * How soon a night is stopped.
   *
   * @param now whether at once, rather than at the next boundary
   */
  record Stop(@JsonProperty("now") boolean now) {}

  /**
   * What is approved.
   *
   * @param thing a job's id, a sample's id, {@code placements} or {@code hand-over}
   * @param reason why
   */
  record Approval(@JsonProperty("thing") String thing, @JsonProperty("reason") String reason) {}

  List<Route> routes() {
    return List.of(
        new Route("GET", "/api/v1/night", (request, name) -> now(request)),
        new Route("POST", "/api/v1/night/stop", (request, name) -> stop(request)),
        new Route("POST", "/api/v1/approvals", (request, name) -> approve(request)),
        new Route("GET", "/api/v1/report", (request, name) -> report(request)));
  }

  private Reply now(Request request) {
    RunState state = desk.state();
    return request.wantsText()
        ? Reply.text(Pages.now(views.now(state), views.jobs(state)))
        : Reply.json(NowAnswer.of(views.now(state)));
  }

  private Reply stop(Request request) {
    Stop stop =
        request.body().isEmpty()
            ? new Stop(false)
            : Bodies.json(request, Stop.class, "{\"now\": true}");
    wishes.ask(new Event.Wish.Stop(stop.now() ? StopWhen.NOW : StopWhen.AT_BOUNDARY));
    return Reply.json(NowAnswer.of(views.now(desk.state())));
  }

  private Reply approve(Request request) {
    String example = "{\"thing\": \"placements\", \"reason\": \"looked at them\"}";
    Approval approval = Bodies.json(request, Approval.class, example);
    if (approval.thing() == null || approval.reason() == null) {
      throw Refusal.of(
          RefusalKind.MALFORMED, "an approval needs a thing and a reason; write " + example);
    }
    wishes.ask(new Event.Wish.Approve(approval.thing(), approval.reason()));
    return Reply.json(NowAnswer.of(views.now(desk.state())));
  }

  private Reply report(Request request) {
    RunState state = desk.state();
    Profile profile = desk.setup().profile();
    Night night = night(Optional.ofNullable(request.query().get("night")), profile.zone());
    NightReport report =
        new NightReports(profile.abilities().instrument(), profile.zone())
            .of(night, views.entries(state), state.exposing(), desk.now());
    return request.wantsText()
        ? Reply.text(Pages.night(report))
        : Reply.json(NightAnswer.of(report));
  }

  private Night night(Optional<String> date, ZoneId zone) {
    ShiftCalendar calendar = desk.setup().calendar();
    if (date.isEmpty()) {
      return Night.at(desk.now(), calendar, zone)
          .orElseThrow(
              () -> Refusal.of(RefusalKind.NOT_FOUND, "there is no shift, so there is no night"));
    }
    try {
      return Night.on(LocalDate.parse(date.get()), calendar, zone)
          .orElseThrow(
              () ->
                  Refusal.of(
                      RefusalKind.NOT_FOUND,
                      "no shift opens on " + date.get() + "; a night is named by that date"));
    } catch (DateTimeException notOne) {
      throw Refusal.of(RefusalKind.MALFORMED, date.get() + " is no date; write night=2031-03-12");
    }
  }
}
