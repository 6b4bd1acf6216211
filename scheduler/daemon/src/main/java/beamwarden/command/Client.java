package beamwarden.command;

import beamwarden.answer.DaemonAnswer;
import beamwarden.answer.Json;
import beamwarden.answer.ProblemAnswer;
import beamwarden.answer.RefusalAnswer;
import java.io.IOException;
import java.io.InputStream;
import java.net.URI;
import java.net.http.HttpClient;
import java.net.http.HttpRequest;
import java.net.http.HttpRequest.BodyPublishers;
import java.net.http.HttpResponse;
import java.net.http.HttpResponse.BodyHandlers;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.util.List;
import java.util.Optional;

/** Speaks REST to one daemon. */
final class Client {
  static final String JSON = "application/json";
  static final String TEXT = "text/plain";

  private static final Duration CONNECTING_MAX = Duration.ofSeconds(5);
  private static final Duration ANSWERING_MAX = Duration.ofSeconds(60);

  private final URI address;
  private final Optional<Path> store;
  private final HttpClient http =
      HttpClient.newBuilder()
          .version(HttpClient.Version.HTTP_1_1)
          .connectTimeout(CONNECTING_MAX)
          .build();

  /**
   * A client.
   *
   * @param address the daemon's address
   * @param store its store, where that is known
   */
  Client(URI address, Optional<Path> store) {
    this.address = address;
    this.store = store;
  }

  /** Whether a daemon answers, and serves the store in this folder. */
  boolean serves(Path folder) {
    try {
      HttpResponse<String> response =
          exchange(request("/api/v1/daemon").GET().build(), BodyHandlers.ofString());
      return Json.read(response.body(), DaemonAnswer.class)
          .map(DaemonAnswer::store)
          .filter(store -> same(Path.of(store), folder))
          .isPresent();
    } catch (IOException gone) {
      return false;
    }
  }

  private static boolean same(Path one, Path other) {
    try {
      return Files.isSameFile(one, other);
    } catch (IOException missing) {
      return false;
    }
  }

  /** Reads something, as JSON or as a page. */
  String get(String path, String type) {
    return answered(send(request(path).header("Accept", type).GET()));
  }

  /** Reads an answer. */
  <T> T get(String path, Class<T> type) {
    return read(get(path, JSON), type);
  }

  /** Asks for a change, and returns what is answered once it is on disk. */
  String post(String path, String contentType, String body) {
    return answered(
        send(
            request(path)
                .header("Authorization", "Bearer " + token())
                .header("Content-Type", contentType)
                .POST(BodyPublishers.ofString(body))));
  }

  <T> T read(String text, Class<T> type) {
    return Json.read(text, type)
        .orElseThrow(
            () ->
                new CommandFailure(
                    ExitCode.OUTSIDE,
                    "what answers at " + address + " is no daemon of ours; check the address"));
  }

  /**
   * Opens the event stream after an entry; empty when the daemon does not know that entry.
   *
   * @throws IOException when the daemon cannot be reached
   */
  Optional<InputStream> events(long after) throws IOException {
    HttpRequest request =
        HttpRequest.newBuilder(address.resolve("/api/v1/events"))
            .header("Last-Event-ID", Long.toString(after))
            .GET()
            .build();
    HttpResponse<InputStream> response = exchange(request, BodyHandlers.ofInputStream());
    if (response.statusCode() == 200) {
      return Optional.of(response.body());
    }
    response.body().close();
    return Optional.empty();
  }

  private HttpRequest.Builder request(String path) {
    return HttpRequest.newBuilder(address.resolve(path)).timeout(ANSWERING_MAX);
  }

  private HttpResponse<String> send(HttpRequest.Builder request) {
    try {
      return exchange(request.build(), BodyHandlers.ofString(StandardCharsets.UTF_8));
    } catch (IOException failure) {
      throw new CommandFailure(
          ExitCode.OUTSIDE,
          "no daemon answers at " + address + "; check that it runs, or start it with serve",
          failure);
    }
  }

  private <T> HttpResponse<T> exchange(HttpRequest request, HttpResponse.BodyHandler<T> handler)
      throws IOException {
    try {
      return http.send(request, handler);
    } catch (InterruptedException interrupted) {
      Thread.currentThread().interrupt();
      throw new CommandFailure(ExitCode.OUTSIDE, "the command was interrupted", interrupted);
    }
  }

  private String answered(HttpResponse<String> response) {
    if (response.statusCode() < 300) {
      return response.body();
    }
    RefusalAnswer refusal = read(response.body(), RefusalAnswer.class);
    if (refusal.detail() == null) {
      throw new CommandFailure(
          ExitCode.OUTSIDE, address + " answers with status " + response.statusCode());
    }
    List<String> lines = refusal.problems().stream().map(ProblemAnswer::text).toList();
    throw new CommandFailure(code(response.statusCode()), refusal.detail())
        .answering(response.body(), lines);
  }

  /** What was asked is refused, or the way of asking is: then something else is wrong. */
  private static ExitCode code(int status) {
    return switch (status) {
      case 400, 404, 409, 413, 415, 422 -> ExitCode.NO;
      default -> ExitCode.OUTSIDE;
    };
  }

  /** The token in the store's folder; a daemon found by its address says where that is. */
  private String token() {
    Path folder = store.orElseGet(() -> Path.of(get("/api/v1/daemon", DaemonAnswer.class).store()));
    Path file = folder.resolve("token");
    try {
      return Files.readString(file).strip();
    } catch (IOException unreadable) {
      throw new CommandFailure(
          ExitCode.OUTSIDE,
          "a change needs the daemon's token, and "
              + file
              + " cannot be read; ask as the user who runs the daemon, or name its store with"
              + " --store",
          unreadable);
    }
  }
}
