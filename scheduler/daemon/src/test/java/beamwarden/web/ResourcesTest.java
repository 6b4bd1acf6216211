package beamwarden.web;

import static beamwarden.web.Served.json;
import static beamwarden.web.Served.keys;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.instrument.StopWhen;
import beamwarden.ledger.Entry;
import beamwarden.queue.HeldFor;
import beamwarden.queue.JobState;
import beamwarden.run.Event;
import java.net.http.HttpRequest;
import java.net.http.HttpResponse;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import tools.jackson.databind.JsonNode;

class ResourcesTest {
  private static final String JSON = "application/json";

  private final Served served = new Served();

  @AfterEach
  void close() {
    served.close();
  }

  private Event.Wish onlyWish() {
    assertEquals(1, served.desk.asked().size());
    return served.desk.asked().get(0);
  }

  @Nested
  class Queues {
    @ParameterizedTest
    @ValueSource(strings = {"application/yaml", "text/yaml; charset=utf-8", "Application/X-YAML"})
    void areTakenInAsYaml(String type) {
      HttpResponse<String> answer = served.postFile("/api/v1/queues", type, "01-first-look.yaml");
      assertEquals(201, answer.statusCode(), answer.body());
      assertEquals("/api/v1/jobs", answer.headers().firstValue("Location").orElseThrow());
      Event.Wish.Submit submit = (Event.Wish.Submit) onlyWish();
      assertEquals("profile-hash", submit.profileHash());
      assertEquals(submit.queue().jobs().get(0).id(), json(answer).get("jobs").get(0).asString());
    }

    @Test
    void areTakenInAsJson() {
      HttpResponse<String> answer = served.postFile("/api/v1/queues", JSON, "01-first-look.json");
      assertEquals(201, answer.statusCode(), answer.body());
    }

    @Test
    void withProblemsAreRefusedWithEachPlaceToMend() {
      HttpResponse<String> answer =
          served.post(
              "/api/v1/queues?name=tonight.yaml",
              "application/yaml",
              "queue: tonight\nsamples: []\njobs: nothing\n");
      assertEquals(422, answer.statusCode());
      assertEquals(
          "application/problem+json", answer.headers().firstValue("Content-Type").orElseThrow());
      JsonNode refusal = json(answer);
      assertEquals(
          List.of("type", "title", "status", "detail", "instance", "problems"), keys(refusal));
      assertEquals("/api/v1/refusals/document-problems", refusal.get("type").asString());
      assertEquals(422, refusal.get("status").asInt());
      assertEquals("/api/v1/queues", refusal.get("instance").asString());
      JsonNode problem = refusal.get("problems").get(0);
      assertEquals(
          List.of("severity", "file", "line", "column", "path", "message", "advice"),
          keys(problem));
      assertEquals("error", problem.get("severity").asString());
      assertEquals("tonight.yaml", problem.get("file").asString());
      assertTrue(problem.get("line").asInt() > 0);
      assertEquals(List.of(), served.desk.asked());
    }

    @Test
    void thatTheRunRefusesAreAConflict() {
      served.desk.answer(Optional.of("the store already has survey"));
      HttpResponse<String> answer =
          served.postFile("/api/v1/queues", "application/yaml", "01-first-look.yaml");
      assertEquals(409, answer.statusCode());
      assertEquals("the store already has survey", json(answer).get("detail").asString());
    }
  }

  @Nested
  class Jobs {
    @Test
    void areListedWithTheirProgress() {
      served.submitOvernight();
      JsonNode answer = json(served.get("/api/v1/jobs"));
      assertEquals(4, answer.get("entry").asInt());
      assertEquals(8, answer.get("jobs").size());
      JsonNode texture = answer.get("jobs").get(0);
      assertEquals("texture", texture.get("id").asString());
      assertEquals("ready", texture.get("state").asString());
      assertEquals("waiting", answer.get("jobs").get(2).get("state").asString());
      assertEquals(0.0, texture.get("done_fraction").asDouble());
      assertTrue(texture.get("running").isNull());
    }

    @Test
    void areAPageForWhoeverAsksForText() {
      served.submitOvernight();
      HttpResponse<String> page = served.get("/api/v1/jobs", "Accept", "text/plain");
      assertTrue(page.body().startsWith("north-room at 2031-03-12 19:10"), page.body());
      assertTrue(page.headers().firstValue("Content-Type").orElseThrow().startsWith("text/plain"));
    }

    @Test
    void areAnsweredOneByOneWithTheirDose() {
      served.submitOvernight();
      JsonNode job = json(served.get("/api/v1/jobs/texture"));
      assertEquals("lim-02", job.get("sample").asString());
      assertEquals("electron-image", job.get("mode").asString());
      assertEquals(0.0, job.get("charge_C").asDouble());
      assertEquals(0.0, job.get("highest_e_per_nm2").asDouble());
    }

    @ParameterizedTest
    @ValueSource(
        strings = {
          "/api/v1/jobs/none/hold",
          "/api/v1/jobs/none/release",
          "/api/v1/jobs/none/withdraw"
        })
    void thatAreNotThereAreNotFound(String path) {
      assertEquals(404, served.post(path).statusCode());
      assertEquals(404, served.get("/api/v1/jobs/none").statusCode());
      assertEquals(List.of(), served.desk.asked());
    }

    @Test
    void areHeldReleasedAndWithdrawnOneByOne() {
      served.submitOvernight();
      HttpResponse<String> held = served.post("/api/v1/jobs/texture/hold");
      assertEquals(200, held.statusCode());
      assertEquals("texture", json(held).get("jobs").get(0).get("id").asString());
      served.post("/api/v1/jobs/texture/release");
      served.post("/api/v1/jobs/texture/withdraw");
      assertEquals(
          List.of(
              new Event.Wish.Hold(List.of("texture")),
              new Event.Wish.Release(List.of("texture"), false),
              new Event.Wish.Withdraw(List.of("texture"))),
          served.desk.asked());
    }

    @Test
    void areHeldAllAtOnceButThoseThatEndedOrAreHeld() {
      served.submitOvernight();
      served.desk.record(
          new Entry.JobChanged("texture", JobState.DONE, Optional.empty(), ""),
          new Entry.JobChanged("vein", JobState.HELD, Optional.of(HeldFor.A_PERSON), "a person"));
      served.post("/api/v1/jobs/hold", JSON, "{\"all\": true}");
      List<String> held = ((Event.Wish.Hold) onlyWish()).jobs();
      assertEquals(6, held.size());
      assertTrue(held.contains("cement-survey"));
    }

    @Test
    void areReleasedAllAtOnceWithTheNight() {
      served.submitOvernight();
      served.desk.record(
          new Entry.JobChanged("vein", JobState.HELD, Optional.of(HeldFor.A_PERSON), "a person"),
          new Entry.JobChanged("texture", JobState.HELD, Optional.of(HeldFor.APPROVAL), "a cap"));
      served.post("/api/v1/jobs/release", JSON, "{\"all\": true}");
      assertEquals(new Event.Wish.Release(List.of("vein"), true), onlyWish());
    }

    @Test
    void areWithdrawnByName() {
      served.submitOvernight();
      served.post("/api/v1/jobs/withdraw", JSON, "{\"jobs\": [\"vein\", \"texture\"]}");
      assertEquals(new Event.Wish.Withdraw(List.of("vein", "texture")), onlyWish());
    }

    @ParameterizedTest
    @ValueSource(
        strings = {"{}", "{\"all\": true, \"jobs\": [\"vein\"]}", "[]", "{", "{\"all\": 1x}"})
    void areNotChangedByABodyThatSaysNotWhich(String body) {
      served.submitOvernight();
      assertEquals(400, served.post("/api/v1/jobs/hold", JSON, body).statusCode());
      assertEquals(List.of(), served.desk.asked());
    }
  }

  @Nested
  class TheNight {
    @Test
    void saysWhatGoesOn() {
      JsonNode now = json(served.get("/api/v1/night"));
      assertEquals("north-room", now.get("instrument").asString());
      assertEquals("unreachable", now.get("state").asString());
      assertEquals("2031-03-12T18:10:00Z", now.get("now").asString());
      assertEquals("2031-03-12T18:00:00Z", now.get("shift").get("opens").asString());
      assertEquals(600.0, now.get("shift").get("wind_down_s").asDouble());
      assertEquals("2031-03-13T18:00:00Z", now.get("next_shift").get("opens").asString());
    }

    @Test
    void isStoppedAtTheNextBoundaryOrAtOnce() {
      served.post("/api/v1/night/stop");
      served.post("/api/v1/night/stop", JSON, "{\"now\": false}");
      served.post("/api/v1/night/stop", JSON, "{\"now\": true}");
      assertEquals(
          List.of(
              new Event.Wish.Stop(StopWhen.AT_BOUNDARY),
              new Event.Wish.Stop(StopWhen.AT_BOUNDARY),
              new Event.Wish.Stop(StopWhen.NOW)),
          served.desk.asked());
    }

    @Test
    void isApprovedWithAReason() {
      HttpResponse<String> answer =
          served.post(
              "/api/v1/approvals", JSON, "{\"thing\": \"placements\", \"reason\": \"looked\"}");
      assertEquals(200, answer.statusCode());
      assertEquals(new Event.Wish.Approve("placements", "looked"), onlyWish());
      assertEquals(
          400, served.post("/api/v1/approvals", JSON, "{\"thing\": \"vein\"}").statusCode());
    }

    @Test
    void isReportedByItsDateOrTheLastWithoutOne() {
      served.submitOvernight();
      JsonNode last = json(served.get("/api/v1/report"));
      assertEquals("2031-03-12", last.get("night").asString());
      assertEquals(8, last.get("jobs").size());
      assertEquals(3, last.get("samples").size());
      assertEquals(
          List.of("kind", "area", "unit", "limit", "booked", "upper", "left", "at_m", "because"),
          keys(last.get("samples").get(0).get("caps").get(0)));
      assertEquals(last, json(served.get("/api/v1/report?night=2031-03-12")));
      assertEquals(404, served.get("/api/v1/report?night=2031-03-08").statusCode());
      assertEquals(400, served.get("/api/v1/report?night=yesterday").statusCode());
    }

    @Test
    void isAPageForWhoeverAsksForText() {
      served.submitOvernight();
      String page = served.get("/api/v1/report", "Accept", "text/plain").body();
      assertTrue(page.startsWith("Night of 2031-03-12, north-room"), page);
    }
  }

  @Nested
  class Samples {
    @Test
    void areListedWithTheirCaps() {
      served.submitOvernight();
      JsonNode samples = json(served.get("/api/v1/samples")).get("samples");
      assertEquals("lim-02", samples.get(0).get("id").asString());
      assertEquals(900.0, samples.get(0).get("caps").get(0).get("limit").asDouble());
    }

    @Test
    void showTheirDoseBooks() {
      served.submitOvernight();
      JsonNode dose = json(served.get("/api/v1/samples/dia-5/dose"));
      assertEquals("dia-5", dose.get("id").asString());
      assertEquals(0, dose.get("entries").size());
      String page = served.get("/api/v1/samples/dia-5/dose", "Accept", "text/plain").body();
      assertTrue(page.startsWith("Dose of dia-5"), page);
    }

    @Test
    void thatAreNotThereAreNotFound() {
      assertEquals(404, served.get("/api/v1/samples/none/dose").statusCode());
    }
  }

  @Test
  void theFrontSaysWhatThereIs() {
    HttpResponse<String> front = served.get("/");
    assertEquals(200, front.statusCode());
    assertTrue(front.body().contains("/api/v1/queues"));
    front.body().lines().forEach(line -> assertTrue(line.length() <= 80, line));
  }

  @Test
  void whereTheStoreLiesIsToldSoThatItsOwnerFindsTheToken() {
    JsonNode daemon = json(served.get("/api/v1/daemon"));
    assertEquals(Served.STORE.toAbsolutePath().toString(), daemon.get("store").asString());
    assertEquals("profile-hash", daemon.get("profile_sha256").asString());
  }

  @Test
  void everyRefusalNamesAPageThatExplainsIt() {
    String type = json(served.get("/api/v1/nothing")).get("type").asString();
    HttpResponse<String> page = served.get(type);
    assertEquals(200, page.statusCode());
    assertTrue(page.body().startsWith("Not found\n"), page.body());
  }

  @Test
  void headIsAnsweredLikeGetWithoutABody() {
    HttpResponse<String> head =
        served.send(
            served.request("/api/v1/jobs").method("HEAD", HttpRequest.BodyPublishers.noBody()));
    assertEquals(200, head.statusCode());
    assertEquals("", head.body());
  }
}
