package beamwarden.web.api;

import beamwarden.answer.DaemonAnswer;
import java.util.List;

/** The way in for a person who found the address, and the pages that explain refusals. */
final class FrontResource {
  private static final String PAGE =
      """
      Beamwarden

      This is the daemon that runs the night's cathodoluminescence acquisitions.
      Reading is free on this machine; every change needs the token that lies in
      the store's folder, as the header  Authorization: Bearer TOKEN.
      Reports come as JSON, or as a page with the header  Accept: text/plain.

      GET   /api/v1/daemon                 where the store lies
      GET   /api/v1/night                  what goes on just now
      GET   /api/v1/jobs                   where the jobs stand
      GET   /api/v1/jobs/ID                one job, with its dose
      GET   /api/v1/samples                what the samples received, what is left
      GET   /api/v1/samples/ID/dose        one sample's dose books
      GET   /api/v1/report?night=DATE      the report of a night; the last without
      GET   /api/v1/events                 server-sent events; resumes
      POST  /api/v1/queues                 hand in a queue, in YAML or JSON
      POST  /api/v1/jobs/ID/hold           hold a job; release and withdraw alike
      POST  /api/v1/jobs/hold              {"all": true} or {"jobs": [...]}
      POST  /api/v1/night/stop             {"now": true} blanks at once
      POST  /api/v1/approvals              {"thing": "...", "reason": "..."}

      Beamwarden is no safety system. Interlocks, hardware limits and the site's
      rules come first.
      """;

  private final DaemonAnswer facts;

  FrontResource(DaemonAnswer facts) {
    this.facts = facts;
  }

  List<Route> routes() {
    return List.of(
        new Route("GET", "/", (request, name) -> Reply.text(PAGE)),
        new Route("GET", "/api/v1/daemon", (request, name) -> Reply.json(facts)),
        new Route("GET", "/api/v1/refusals/*", (request, name) -> explain(name)));
  }

  private static Reply explain(String word) {
    return RefusalKind.named(word)
        .map(kind -> Reply.text(kind.page()))
        .orElseThrow(
            () -> Refusal.of(RefusalKind.NOT_FOUND, "there is no kind of refusal called " + word));
  }
}
