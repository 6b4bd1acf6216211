package beamwarden.web;

import beamwarden.document.QueueDocuments;
import beamwarden.ledger.Entry;
import beamwarden.queue.Queue;
import java.io.IOException;
import java.net.URI;
import java.net.http.HttpClient;
import java.net.http.HttpRequest;
import java.net.http.HttpResponse;
import java.net.http.HttpResponse.BodyHandlers;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.util.List;
import java.util.stream.Stream;
import tools.jackson.databind.JsonNode;
import tools.jackson.databind.json.JsonMapper;

/** A web server in front of a fake run, spoken to over real loopback HTTP. */
public final class Served implements AutoCloseable {
  /** The token that changes need. */
  public static final String TOKEN = "the-token";

  static final Path STORE = Path.of("store");
  private static final JsonMapper JSON = new JsonMapper();

  /** The run behind it. */
  public final FakeDesk desk;

  final WebServer server;

  /** Its address. */
  public final URI address;

  final HttpClient client =
      HttpClient.newBuilder()
          .version(HttpClient.Version.HTTP_1_1)
          .connectTimeout(Duration.ofSeconds(5))
          .build();

  Served() {
    this(Duration.ofSeconds(10));
  }

  Served(Duration patience) {
    this(new FakeDesk(), STORE, patience);
  }

  private Served(FakeDesk desk, Path store, Duration patience) {
    this.desk = desk;
    server = new WebServer(desk, new WebSettings(0, TOKEN, "profile-hash", store), patience);
    address = server.start();
  }

  /** A server whose address and token lie in a store's folder, as those of a daemon do. */
  public static Served in(Path store, FakeDesk desk) {
    Served served = new Served(desk, store, Duration.ofSeconds(10));
    try {
      Files.writeString(store.resolve("token"), TOKEN + "\n");
      Files.writeString(store.resolve("address"), served.address + "\n");
    } catch (IOException failure) {
      throw new IllegalStateException(failure);
    }
    return served;
  }

  /** The overnight queue of the examples. */
  public static Queue overnight(FakeDesk desk) {
    return QueueDocuments.read(
            FakeDesk.EXAMPLES.resolve("02-overnight.yaml"), desk.setup().profile())
        .value()
        .orElseThrow();
  }

  /** Puts the overnight queue into the books, as if it had been handed in. */
  public Queue submitOvernight() {
    Queue queue = overnight(desk);
    Stream<Entry> samples =
        queue.samples().stream().map(sample -> new Entry.SampleDeclared(sample, ""));
    desk.record(
        Stream.concat(Stream.of(new Entry.QueueSubmitted(queue, "profile-hash")), samples)
            .toArray(Entry[]::new));
    return queue;
  }

  HttpRequest.Builder request(String path) {
    return HttpRequest.newBuilder(address.resolve(path)).timeout(Duration.ofSeconds(20));
  }

  HttpResponse<String> get(String path, String... headers) {
    HttpRequest.Builder request = request(path).GET();
    return send(headers.length == 0 ? request : request.headers(headers));
  }

  /** A change with the token. */
  HttpResponse<String> post(String path, String type, String body) {
    return send(
        request(path)
            .header("Authorization", "Bearer " + TOKEN)
            .header("Content-Type", type)
            .POST(HttpRequest.BodyPublishers.ofString(body)));
  }

  HttpResponse<String> post(String path) {
    return send(
        request(path)
            .header("Authorization", "Bearer " + TOKEN)
            .POST(HttpRequest.BodyPublishers.noBody()));
  }

  HttpResponse<String> postFile(String path, String type, String example) {
    try {
      return post(path, type, Files.readString(FakeDesk.EXAMPLES.resolve(example)));
    } catch (IOException failure) {
      throw new IllegalStateException(failure);
    }
  }

  HttpResponse<String> send(HttpRequest.Builder request) {
    try {
      return client.send(request.build(), BodyHandlers.ofString());
    } catch (IOException failure) {
      throw new IllegalStateException(failure);
    } catch (InterruptedException interrupted) {
      Thread.currentThread().interrupt();
      throw new IllegalStateException(interrupted);
    }
  }

  static JsonNode json(HttpResponse<String> response) {
    return JSON.readTree(response.body());
  }

  static List<String> keys(JsonNode node) {
    return List.copyOf(node.propertyNames());
  }

  @Override
  public void close() {
    server.close();
  }
}
