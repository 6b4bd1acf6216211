package beamwarden.web.api;

import beamwarden.answer.DaemonAnswer;
import beamwarden.run.Desk;
import java.time.Duration;
import java.util.List;
import java.util.stream.Collectors;
import java.util.stream.Stream;

/** The whole REST interface but the event stream. Safe for use by several threads. */
public final class Api {
  /** The most bytes of a body that are read. */
  public static final int BODY_BYTES_MAX = 2 * 1024 * 1024;

  /** The path of the event stream, which is served apart. */
  public static final String EVENTS = "/api/v1/events";

  private final List<Route> routes;

  /**
   * The interface of a run.
   *
   * @param desk where the run is asked
   * @param facts what does not change while the daemon runs
   * @param patience how long a change may take until it is on disk
   */
  public Api(Desk desk, DaemonAnswer facts, Duration patience) {
    Wishes wishes = new Wishes(desk, patience);
    Views views = new Views(desk);
    routes =
        Stream.of(
                new FrontResource(facts).routes(),
                new QueueResource(desk, wishes, facts.profileHash()).routes(),
                new JobResource(desk, wishes, views).routes(),
                new NightResource(desk, wishes, views).routes(),
                new SampleResource(desk, views).routes())
            .flatMap(List::stream)
            .toList();
  }

  /** Answers a request; a refusal is thrown. */
  public Reply answer(Request request) {
    String method = request.method().equals("HEAD") ? "GET" : request.method();
    List<Route> there =
        routes.stream().filter(route -> route.nameIn(request.parts()).isPresent()).toList();
    if (there.isEmpty()) {
      throw Refusal.of(
          RefusalKind.NOT_FOUND,
          "there is nothing at " + request.path() + "; / lists what there is");
    }
    Route route =
        there.stream()
            .filter(one -> one.method().equals(method))
            .findFirst()
            .orElseThrow(() -> notAllowed(request, there));
    return route.resource().answer(request, route.nameIn(request.parts()).orElse(""));
  }

  private static Refusal notAllowed(Request request, List<Route> there) {
    String allowed =
        there.stream()
            .flatMap(
                route ->
                    route.method().equals("GET")
                        ? Stream.of("GET", "HEAD")
                        : Stream.of(route.method()))
            .distinct()
            .collect(Collectors.joining(", "));
    return Refusal.of(
            RefusalKind.METHOD_NOT_ALLOWED,
            request.path() + " does not take " + request.method() + ", but " + allowed)
        .with("Allow", allowed);
  }
}
