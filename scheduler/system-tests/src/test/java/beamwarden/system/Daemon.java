package beamwarden.system;

import java.io.IOException;
import java.net.URI;
import java.net.http.HttpClient;
import java.net.http.HttpRequest;
import java.net.http.HttpResponse;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.TimeUnit;
import tools.jackson.databind.JsonNode;
import tools.jackson.databind.json.JsonMapper;

/** A daemon in a process of its own, as {@code beamwarden serve} starts it, that can be killed. */
final class Daemon {
  private static final JsonMapper JSON = new JsonMapper();
  private static final Duration STARTS_WITHIN = Duration.ofSeconds(90);
  private static final long LOOK_EVERY_MILLIS = 20;

  private final Path profile;
  private final Path store;
  private final HttpClient http =
      HttpClient.newBuilder().connectTimeout(Duration.ofSeconds(5)).build();
  private Process process;

  Daemon(Path profile, Path store) {
    this.profile = profile;
    this.store = store;
  }

  /** Starts it; {@code more} are further options of {@code serve}. */
  void start(String... more) throws IOException, InterruptedException {
    Files.deleteIfExists(store.resolve("address"));
    List<String> command = new ArrayList<>();
    command.add(Path.of(System.getProperty("java.home"), "bin", "java").toString());
    command.addAll(List.of("-Xmx256m", "-XX:+UseSerialGC", "-XX:TieredStopAtLevel=1"));
    command.addAll(List.of("-cp", productionClassPath(), "beamwarden.command.Main", "serve"));
    command.addAll(List.of("--instrument", profile.toString(), "--store", store.toString()));
    command.addAll(List.of(more));
    Path log = store.resolveSibling(store.getFileName() + ".log");
    process =
        new ProcessBuilder(command)
            .redirectErrorStream(true)
            .redirectOutput(ProcessBuilder.Redirect.appendTo(log.toFile()))
            .start();
    long latest = System.nanoTime() + STARTS_WITHIN.toNanos();
    while (!Files.exists(store.resolve("address"))) {
      if (!process.isAlive() || System.nanoTime() > latest) {
        throw new AssertionError("serve did not start:\n" + Files.readString(log));
      }
      Thread.sleep(LOOK_EVERY_MILLIS);
    }
  }

  /** The class path without this module's own classes. */
  private static String productionClassPath() {
    return System.getProperty("java.class.path");
  }

  boolean isAlive() {
    return process != null && process.isAlive();
  }

  /** Kills it without warning. */
  void kill() throws InterruptedException {
    process.destroyForcibly();
    process.waitFor();
  }

  /** Asks it to end, as a service manager does, and waits. */
  void stop() throws InterruptedException {
    process.destroy();
    if (!process.waitFor(60, TimeUnit.SECONDS)) {
      process.destroyForcibly();
      throw new AssertionError("serve did not end within a minute of SIGTERM");
    }
  }

  /** The process id of the instrument's own process, if it runs. */
  Optional<Long> instrument(String name) throws IOException {
    Path address = store.resolve("simulated").resolve(name).resolve("address");
    if (!Files.exists(address)) {
      return Optional.empty();
    }
    long pid = JSON.readTree(Files.readString(address)).get("pid").asLong();
    return ProcessHandle.of(pid).filter(ProcessHandle::isAlive).map(ProcessHandle::pid);
  }

  JsonNode get(String path) throws IOException, InterruptedException {
    HttpResponse<String> answer =
        http.send(request(path).GET().build(), HttpResponse.BodyHandlers.ofString());
    return JSON.readTree(answer.body());
  }

  /** Sends a change; returns the status. */
  int post(String path, String type, String body) throws IOException, InterruptedException {
    HttpRequest request =
        request(path)
            .header("Authorization", "Bearer " + Files.readString(store.resolve("token")).strip())
            .header("Content-Type", type)
            .POST(HttpRequest.BodyPublishers.ofString(body))
            .build();
    return http.send(request, HttpResponse.BodyHandlers.ofString()).statusCode();
  }

  private HttpRequest.Builder request(String path) throws IOException {
    String address = Files.readString(store.resolve("address")).strip();
    return HttpRequest.newBuilder(URI.create(address + path)).timeout(Duration.ofSeconds(30));
  }
}
