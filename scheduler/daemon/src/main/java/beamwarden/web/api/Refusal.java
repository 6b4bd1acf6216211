package beamwarden.web.api;

import beamwarden.answer.Json;
import beamwarden.answer.ProblemAnswer;
import beamwarden.answer.RefusalAnswer;
import java.util.List;
import java.util.Map;

/** A request that is not fulfilled: thrown by a resource, written as problem details. */
public final class Refusal extends RuntimeException {
  private static final long serialVersionUID = 1L;

  private static final String PROBLEM_JSON = "application/problem+json";

  private final RefusalKind kind;
  private final transient List<ProblemAnswer> problems;
  private final transient Map<String, String> headers;

  private Refusal(
      RefusalKind kind, String detail, List<ProblemAnswer> problems, Map<String, String> headers) {
    super(detail);
    this.kind = kind;
    this.problems = List.copyOf(problems);
    this.headers = Map.copyOf(headers);
  }

  /** A refusal with one sentence: what was refused, and what to do. */
  public static Refusal of(RefusalKind kind, String detail) {
    return new Refusal(kind, detail, List.of(), Map.of());
  }

  static Refusal of(RefusalKind kind, String detail, List<ProblemAnswer> problems) {
    return new Refusal(kind, detail, problems, Map.of());
  }

  /** The same with a further header. */
  public Refusal with(String header, String value) {
    return new Refusal(kind, getMessage(), problems, Map.of(header, value));
  }

  /** The reply that says so for a path. */
  public Reply reply(String path) {
    RefusalAnswer answer =
        new RefusalAnswer(kind.type(), kind.title(), kind.status(), getMessage(), path, problems);
    return new Reply(kind.status(), PROBLEM_JSON, headers, Json.line(answer));
  }

  /** Adds no trace: it is an answer, not a mishap. */
  @Override
  public synchronized Throwable fillInStackTrace() {
    return this;
  }
}
