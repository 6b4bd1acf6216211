package beamwarden.web;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.net.ConnectException;
import java.net.http.HttpRequest;
import java.net.http.HttpResponse;
import java.net.http.HttpResponse.BodyHandlers;
import java.time.Duration;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.TimeUnit;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.Timeout;

@Timeout(60)
class LoadAndShutdownTest {
  private static CompletableFuture<HttpResponse<String>> stop(Served served) {
    HttpRequest request =
        served
            .request("/api/v1/night/stop")
            .header("Authorization", "Bearer " + Served.TOKEN)
            .POST(HttpRequest.BodyPublishers.noBody())
            .build();
    return served.client.sendAsync(request, BodyHandlers.ofString());
  }

  @Test
  void refusesMoreRequestsThanItHasRoomForAndServesTheRest() throws Exception {
    try (Served served = new Served(Duration.ofSeconds(30))) {
      CompletableFuture<Optional<String>> answer = new CompletableFuture<>();
      served.desk.answer(answer);
      List<CompletableFuture<HttpResponse<String>>> asked =
          IntStream.range(0, 100).mapToObj(i -> stop(served)).toList();
      HttpResponse<String> first =
          CompletableFuture.anyOf(asked.toArray(CompletableFuture[]::new))
              .thenApply(LoadAndShutdownTest::cast)
              .get(30, TimeUnit.SECONDS);
      assertEquals(503, first.statusCode());
      assertTrue(first.body().contains("too many requests are under way"), first.body());
      assertEquals("1", first.headers().firstValue("Retry-After").orElseThrow());
      answer.complete(Optional.empty());
      long served200 = 0;
      for (CompletableFuture<HttpResponse<String>> one : asked) {
        served200 += one.get(30, TimeUnit.SECONDS).statusCode() == 200 ? 1 : 0;
      }
      assertTrue(served200 >= 64, served200 + " were served");
    }
  }

  @SuppressWarnings("unchecked")
  private static HttpResponse<String> cast(Object response) {
    return (HttpResponse<String>) response;
  }

  @Test
  void finishesWhatIsUnderWayThenTakesNothingMore() throws Exception {
    Served served = new Served(Duration.ofSeconds(30));
    CompletableFuture<Optional<String>> answer = new CompletableFuture<>();
    served.desk.answer(answer);
    CompletableFuture<HttpResponse<String>> underWay = stop(served);
    while (served.desk.asked().isEmpty()) {
      Thread.onSpinWait();
    }
    Thread closing = new Thread(served::close);
    closing.start();
    HttpResponse<String> late = served.get("/api/v1/night");
    while (late.statusCode() == 200) {
      late = served.get("/api/v1/night");
    }
    assertEquals(503, late.statusCode());
    assertEquals("the daemon is closing; ask it later", Served.json(late).get("detail").asString());
    answer.complete(Optional.empty());
    assertEquals(200, underWay.get(30, TimeUnit.SECONDS).statusCode());
    closing.join();
    IllegalStateException gone =
        assertThrows(IllegalStateException.class, () -> served.get("/api/v1/night"));
    assertTrue(gone.getCause() instanceof ConnectException, gone.toString());
  }

  @Test
  void saysWhatToDoWhenItsPortIsTaken() {
    try (Served served = new Served()) {
      int port = served.address.getPort();
      try (WebServer second =
          new WebServer(
              new FakeDesk(), new WebSettings(port, Served.TOKEN, "hash", Served.STORE))) {
        WebException refused = assertThrows(WebException.class, second::start);
        assertEquals(
            "port " + port + " on 127.0.0.1 cannot be had; choose another one with --port",
            refused.getMessage());
      }
    }
  }

  @Test
  void keepsItsTokenToItself() {
    assertEquals(
        "WebSettings[port=0, token=***, profileHash=hash, store=store]",
        new WebSettings(0, "secret", "hash", Served.STORE).toString());
    assertThrows(
        IllegalArgumentException.class, () -> new WebSettings(0, " ", "hash", Served.STORE));
    assertThrows(
        IllegalArgumentException.class,
        () -> new WebSettings(65_536, "secret", "hash", Served.STORE));
  }
}
