package beamwarden.web;

import static beamwarden.web.Served.json;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.run.Event;
import beamwarden.web.api.Api;
import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.net.InetAddress;
import java.net.Socket;
import java.net.http.HttpRequest;
import java.net.http.HttpResponse;
import java.nio.charset.StandardCharsets;
import java.time.Duration;
import java.util.List;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class RefusalsTest {
  private final Served served = new Served(Duration.ofMillis(200));

  @AfterEach
  void close() {
    served.close();
  }

  private void refused(int status, String type, HttpResponse<String> answer) {
    assertEquals(status, answer.statusCode(), answer.body());
    assertEquals(
        "application/problem+json", answer.headers().firstValue("Content-Type").orElseThrow());
    assertEquals("/api/v1/refusals/" + type, json(answer).get("type").asString());
    assertEquals(status, json(answer).get("status").asInt());
    assertTrue(!json(answer).get("detail").asString().isBlank());
  }

  /** Sends a request as it stands and gives its answer; the JDK's client keeps Host for itself. */
  private String raw(String request) throws IOException {
    try (Socket socket = new Socket(InetAddress.getLoopbackAddress(), served.address.getPort())) {
      socket.setSoTimeout(10_000);
      socket.getOutputStream().write(request.getBytes(StandardCharsets.UTF_8));
      socket.getOutputStream().flush();
      return new String(socket.getInputStream().readAllBytes(), StandardCharsets.UTF_8);
    }
  }

  private String rawGet(String host) throws IOException {
    return raw("GET /api/v1/night HTTP/1.1\r\n" + host + "Connection: close\r\n\r\n");
  }

  @Nested
  class Hosts {
    @ParameterizedTest
    @ValueSource(strings = {"127.0.0.1:%d", "localhost:%d", "LOCALHOST:%d", "[::1]:%d"})
    void ofLoopbackAreOurs(String host) throws IOException {
      String line = "Host: " + String.format(host, served.address.getPort()) + "\r\n";
      assertTrue(rawGet(line).startsWith("HTTP/1.1 200"));
    }

    @ParameterizedTest
    @ValueSource(
        strings = {"evil.example:%d", "localhost", "localhost:1", "localhost.evil.example:%d", ""})
    void ofAnyOtherNameAreRefused(String host) throws IOException {
      String line = "Host: " + String.format(host, served.address.getPort()) + "\r\n";
      assertTrue(rawGet(line).startsWith("HTTP/1.1 421"), rawGet(line));
    }

    @Test
    void thatAreMissingAreRefused() throws IOException {
      assertTrue(raw("GET / HTTP/1.0\r\n\r\n").contains(" 421 "));
    }
  }

  @Nested
  class Origins {
    @Test
    void ofOurOwnAreLetThrough() {
      String own = "http://127.0.0.1:" + served.address.getPort();
      assertEquals(200, served.get("/api/v1/night", "Origin", own).statusCode());
    }

    @ParameterizedTest
    @ValueSource(
        strings = {"http://evil.example", "null", "http://localhost:1", "https://127.0.0.1"})
    void ofOtherPagesAreRefusedEvenForReading(String origin) {
      refused(403, "foreign-origin", served.get("/api/v1/night", "Origin", origin));
    }
  }

  @Nested
  class Tokens {
    private HttpResponse<String> stop(String... headers) {
      HttpRequest.Builder request =
          served.request("/api/v1/night/stop").POST(HttpRequest.BodyPublishers.noBody());
      return served.send(headers.length == 0 ? request : request.headers(headers));
    }

    @Test
    void areNeededForChanges() {
      HttpResponse<String> answer = stop();
      refused(401, "token-needed", answer);
      assertEquals("Bearer", answer.headers().firstValue("WWW-Authenticate").orElseThrow());
    }

    @ParameterizedTest
    @ValueSource(
        strings = {"Bearer wrong", "Bearer ", "the-token", "Basic the-token", "Bearer the-token2"})
    void thatAreWrongAreRefused(String shown) {
      refused(401, "token-needed", stop("Authorization", shown));
      assertEquals(List.of(), served.desk.asked());
    }

    @Test
    void areNotNeededForReading() {
      assertEquals(200, served.get("/api/v1/jobs").statusCode());
    }

    @Test
    void areAskedForBeforeAnythingElseIsTold() {
      HttpRequest.Builder unknown =
          served.request("/api/v1/nothing").POST(HttpRequest.BodyPublishers.noBody());
      refused(401, "token-needed", served.send(unknown));
    }
  }

  @Nested
  class Bodies {
    private static final String QUEUES = "/api/v1/queues";

    @Test
    void ofAnotherMediaTypeAreNotUnderstood() {
      refused(415, "media-type", served.post(QUEUES, "application/xml", "<queue/>"));
      refused(415, "media-type", served.post("/api/v1/jobs/hold", "text/plain", "{\"all\":true}"));
      refused(415, "media-type", served.post(QUEUES));
    }

    @Test
    void ofBytesThatAreNoTextAreMalformed() {
      HttpRequest.Builder request =
          served
              .request(QUEUES)
              .header("Authorization", "Bearer " + Served.TOKEN)
              .header("Content-Type", "application/yaml")
              .POST(HttpRequest.BodyPublishers.ofByteArray(new byte[] {(byte) 0xff, 1}));
      refused(400, "malformed", served.send(request));
    }

    @Test
    void thatAreTooLargeAreRefusedWithALengthAnnounced() {
      String body = "#".repeat(Api.BODY_BYTES_MAX + 1);
      refused(413, "too-large", served.post(QUEUES, "application/yaml", body));
    }

    @Test
    void thatAreTooLargeAreRefusedWithoutOne() {
      byte[] body = new byte[Api.BODY_BYTES_MAX + 1];
      HttpRequest.Builder request =
          served
              .request(QUEUES)
              .header("Authorization", "Bearer " + Served.TOKEN)
              .header("Content-Type", "application/yaml")
              .POST(HttpRequest.BodyPublishers.ofInputStream(() -> new ByteArrayInputStream(body)));
      refused(413, "too-large", served.send(request));
    }

    @Test
    void ofJustTheSizeThatIsReadAreRead() {
      String body = "#".repeat(Api.BODY_BYTES_MAX);
      refused(422, "document-problems", served.post(QUEUES, "application/yaml", body));
    }
  }

  @Nested
  class Paths {
    @ParameterizedTest
    @ValueSource(
        strings = {
          "/api/v1/nothing",
          "/api/v1/jobs/",
          "/api/v1",
          "/api/v1/jobs/a/b/c",
          "/favicon.ico"
        })
    void thatAreNotThereAreNotFound(String path) {
      refused(404, "not-found", served.get(path));
    }

    @Test
    void nameTheirMethodsWhenAnotherIsAsked() {
      HttpResponse<String> answer = served.post("/api/v1/jobs");
      refused(405, "method-not-allowed", answer);
      assertEquals("GET, HEAD", answer.headers().firstValue("Allow").orElseThrow());
      HttpResponse<String> read = served.get("/api/v1/queues");
      refused(405, "method-not-allowed", read);
      assertEquals("POST", read.headers().firstValue("Allow").orElseThrow());
      refused(405, "method-not-allowed", served.post(Api.EVENTS));
    }

    @Test
    void thatStandForAJobMayHaveItsName() {
      refused(404, "not-found", served.post("/api/v1/jobs/hold/hold"));
      assertEquals(List.of(), served.desk.asked());
    }
  }

  @Nested
  class Changes {
    @Test
    void thatAreNotOnDiskInTimeAreSaidToBeUnknown() {
      served.desk.keepSilent();
      HttpResponse<String> answer = served.post("/api/v1/night/stop");
      refused(503, "unavailable", answer);
      assertTrue(json(answer).get("detail").asString().contains("look whether it was made"));
      assertEquals(1, served.desk.asked().size());
    }

    @Test
    void thatBreakTheDaemonAreNotToldHow() {
      served.desk.breakDown();
      HttpResponse<String> answer = served.post("/api/v1/night/stop");
      refused(500, "broken", answer);
      assertTrue(!answer.body().contains("out of order"), answer.body());
    }

    @Test
    void thatTheRunRefusesCarryItsSentence() {
      served.desk.answer(java.util.Optional.of("no placement waits to be confirmed"));
      HttpResponse<String> answer =
          served.post(
              "/api/v1/approvals",
              "application/json",
              "{\"thing\": \"placements\", \"reason\": \"looked\"}");
      refused(409, "refused", answer);
      assertEquals("no placement waits to be confirmed", json(answer).get("detail").asString());
      assertEquals(List.of(new Event.Wish.Approve("placements", "looked")), served.desk.asked());
    }
  }

  @Test
  void aHeaderThatIsTooLongIsNotRead() throws IOException {
    String answer =
        raw(
            "GET / HTTP/1.1\r\nHost: localhost:"
                + served.address.getPort()
                + "\r\nX-Long: "
                + "x".repeat(40_000)
                + "\r\n\r\n");
    assertTrue(answer.isEmpty() || answer.contains(" 4"), answer);
  }
}
