package beamwarden.web.api;

import beamwarden.answer.JobAnswer;
import beamwarden.answer.JobsAnswer;
import beamwarden.answer.ProgressAnswer;
import beamwarden.ledger.JobRecord;
import beamwarden.queue.HeldFor;
import beamwarden.queue.JobState;
import beamwarden.report.JobReport;
import beamwarden.report.NightReports;
import beamwarden.report.Pages;
import beamwarden.run.Desk;
import beamwarden.run.Event;
import beamwarden.run.RunState;
import com.fasterxml.jackson.annotation.JsonProperty;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.function.Predicate;

/** Jobs: where they stand, and holding, releasing and withdrawing them. */
final class JobResource {
  private static final String JOBS = "/api/v1/jobs";
  private static final String EXAMPLE = "{\"all\": true} or {\"jobs\": [\"survey\"]}";

  private static final Set<HeldFor> RELEASABLE = Set.of(HeldFor.A_PERSON, HeldFor.PREDECESSOR);

  private final Desk desk;
  private final Wishes wishes;
  private final Views views;

  JobResource(Desk desk, Wishes wishes, Views views) {
    this.desk = desk;
    this.wishes = wishes;
    this.views = views;
  }

  /**
   * Which jobs a change is about.
   *
   * @param all whether it is about all jobs that it could be about
   * @param jobs the jobs' ids
   */
  record Which(@JsonProperty("all") boolean all, @JsonProperty("jobs") List<String> jobs) {
    Which {
      jobs = jobs == null ? List.of() : List.copyOf(jobs);
    }
  }

  List<Route> routes() {
    return List.of(
        new Route("GET", JOBS, (request, name) -> list(request)),
        new Route("GET", JOBS + "/*", (request, name) -> one(name)),
        new Route("POST", JOBS + "/hold", (request, name) -> hold(several(request, this::mayHold))),
        new Route("POST", JOBS + "/release", (request, name) -> releaseSeveral(request)),
        new Route(
            "POST",
            JOBS + "/withdraw",
            (request, name) -> withdraw(several(request, JobResource::going))),
        new Route("POST", JOBS + "/*/hold", (request, name) -> hold(known(name))),
        new Route("POST", JOBS + "/*/release", (request, name) -> release(known(name), false)),
        new Route("POST", JOBS + "/*/withdraw", (request, name) -> withdraw(known(name))));
  }

  private Reply list(Request request) {
    RunState state = desk.state();
    return request.wantsText()
        ? Reply.text(Pages.now(views.now(state), views.jobs(state)))
        : Reply.json(views.jobs());
  }

  private Reply one(String id) {
    RunState state = desk.state();
    JobReport report =
        NightReports.job(id, state.books(), views.entries(state), views.progress(state))
            .orElseThrow(() -> unknown(id));
    return Reply.json(JobAnswer.of(report));
  }

  private Reply hold(List<String> jobs) {
    wishes.ask(new Event.Wish.Hold(jobs));
    return changed(jobs);
  }

  private Reply releaseSeveral(Request request) {
    boolean night = which(request).all();
    return release(several(request, JobResource::releasable), night);
  }

  private Reply release(List<String> jobs, boolean night) {
    wishes.ask(new Event.Wish.Release(jobs, night));
    return changed(jobs);
  }

  private Reply withdraw(List<String> jobs) {
    wishes.ask(new Event.Wish.Withdraw(jobs));
    return changed(jobs);
  }

  private Reply changed(List<String> jobs) {
    RunState state = desk.state();
    return Reply.json(
        new JobsAnswer(
            state.books().entries(),
            views.jobs(state).stream()
                .filter(job -> jobs.contains(job.id()))
                .map(ProgressAnswer::of)
                .toList()));
  }

  private static Which which(Request request) {
    Which which = Bodies.json(request, Which.class, EXAMPLE);
    if (which.all() != which.jobs().isEmpty()) {
      throw Refusal.of(RefusalKind.MALFORMED, "the body must name jobs or all; write " + EXAMPLE);
    }
    return which;
  }

  private List<String> several(Request request, Predicate<JobRecord> fitting) {
    Which which = which(request);
    if (!which.all()) {
      which.jobs().forEach(this::known);
      return which.jobs();
    }
    return desk.state().books().jobs().stream()
        .filter(fitting)
        .map(record -> record.job().id())
        .toList();
  }

  private boolean mayHold(JobRecord record) {
    return going(record) && record.state() != JobState.HELD;
  }

  private static boolean going(JobRecord record) {
    return !record.state().ended();
  }

  private static boolean releasable(JobRecord record) {
    return record.heldFor().filter(RELEASABLE::contains).isPresent();
  }

  private List<String> known(String id) {
    Optional<JobRecord> record = desk.state().books().job(id);
    if (record.isEmpty()) {
      throw unknown(id);
    }
    return List.of(id);
  }

  private static Refusal unknown(String id) {
    return Refusal.of(
        RefusalKind.NOT_FOUND, "there is no job " + id + "; " + JOBS + " lists the jobs");
  }
}
