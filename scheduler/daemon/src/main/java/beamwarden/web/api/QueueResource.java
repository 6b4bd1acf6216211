package beamwarden.web.api;

import beamwarden.answer.Json;
import beamwarden.answer.ProblemAnswer;
import beamwarden.answer.SubmittedAnswer;
import beamwarden.document.Problem;
import beamwarden.document.QueueDocuments;
import beamwarden.document.Reading;
import beamwarden.queue.Job;
import beamwarden.queue.Queue;
import beamwarden.run.Desk;
import beamwarden.run.Event;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeSet;

/** Queues that are handed in. */
final class QueueResource {
  private static final Set<String> TYPES =
      new TreeSet<>(
          List.of(
              Bodies.JSON,
              "application/yaml",
              "application/x-yaml",
              "text/yaml",
              "text/x-yaml",
              "text/vnd.yaml"));

  private final Desk desk;
  private final Wishes wishes;
  private final String profileHash;

  QueueResource(Desk desk, Wishes wishes, String profileHash) {
    this.desk = desk;
    this.wishes = wishes;
    this.profileHash = profileHash;
  }

  List<Route> routes() {
    return List.of(new Route("POST", "/api/v1/queues", (request, name) -> submit(request)));
  }

  private Reply submit(Request request) {
    String file = request.query().getOrDefault("name", "queue");
    Reading<Queue> reading =
        QueueDocuments.read(file, Bodies.text(request, TYPES), desk.setup().profile());
    Queue queue = reading.value().orElseThrow(() -> problems(reading.problems()));
    wishes.ask(new Event.Wish.Submit(queue, profileHash));
    SubmittedAnswer answer =
        new SubmittedAnswer(
            queue.name(),
            queue.jobs().stream().map(Job::id).toList(),
            reading.problems().stream().map(ProblemAnswer::of).toList());
    return new Reply(201, Reply.JSON, Map.of("Location", "/api/v1/jobs"), Json.line(answer));
  }

  private static Refusal problems(List<Problem> problems) {
    long errors = problems.stream().filter(one -> one.severity() == Problem.Severity.ERROR).count();
    return Refusal.of(
        RefusalKind.DOCUMENT_PROBLEMS,
        "the queue has "
            + errors
            + (errors == 1 ? " error" : " errors")
            + " and was not taken in; mend what problems lists and hand it in again",
        problems.stream().map(ProblemAnswer::of).toList());
  }
}
