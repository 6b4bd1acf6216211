package beamwarden.web;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotNull;
import static org.junit.jupiter.api.Assertions.assertTimeoutPreemptively;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.ledger.Entry;
import beamwarden.ledger.Entry.Noted.What;
import beamwarden.queue.JobState;
import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStream;
import java.io.InputStreamReader;
import java.net.http.HttpRequest;
import java.net.http.HttpResponse;
import java.net.http.HttpResponse.BodyHandlers;
import java.nio.charset.StandardCharsets;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.LongStream;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class EventStreamTest {
  private static final Duration LIMIT = Duration.ofSeconds(20);

  private final Served served = new Served();

  @AfterEach
  void close() {
    served.close();
  }

  private void note(int count) {
    for (int i = 0; i < count; i++) {
      served.desk.record(new Entry.Noted(What.FAULT, "number " + i));
    }
  }

  /** One event as it came. */
  private record Heard(String id, String event, String data) {}

  /** A connection to the stream. */
  private final class Listening implements AutoCloseable {
    private final InputStream in;
    private final BufferedReader lines;

    Listening(String path, String... headers) throws IOException, InterruptedException {
      HttpRequest.Builder request = HttpRequest.newBuilder(served.address.resolve(path));
      HttpResponse<InputStream> answer =
          served.client.send(
              (headers.length == 0 ? request : request.headers(headers)).build(),
              BodyHandlers.ofInputStream());
      assertEquals(200, answer.statusCode());
      assertEquals(
          "text/event-stream; charset=UTF-8",
          answer.headers().firstValue("Content-Type").orElseThrow());
      in = answer.body();
      lines = new BufferedReader(new InputStreamReader(in, StandardCharsets.UTF_8));
    }

    /** The next event; null at the end of the stream. */
    Heard next() throws IOException {
      String id = "";
      String event = "";
      for (String line = lines.readLine(); line != null; line = lines.readLine()) {
        if (line.startsWith("id:")) {
          id = line.substring(3).strip();
        } else if (line.startsWith("event:")) {
          event = line.substring(6).strip();
        } else if (line.startsWith("data:")) {
          return new Heard(id, event, line.substring(5).strip());
        }
      }
      return null;
    }

    List<Long> ids(int count) throws IOException {
      List<Long> ids = new ArrayList<>();
      while (ids.size() < count) {
        Heard heard = next();
        assertNotNull(heard);
        if (heard.event().equals("entry")) {
          ids.add(Long.parseLong(heard.id()));
        }
      }
      return ids;
    }

    @Override
    public void close() throws IOException {
      in.close();
    }
  }

  private static List<Long> numbers(long from, long to) {
    return LongStream.rangeClosed(from, to).boxed().toList();
  }

  @Test
  void tellsEveryEntryInOrderThoseBeforeAndThoseAfterTheConnection() {
    note(100);
    assertTimeoutPreemptively(
        LIMIT,
        () -> {
          try (Listening listening = new Listening("/api/v1/events")) {
            assertEquals(numbers(1, 100), listening.ids(100));
            note(50);
            assertEquals(numbers(101, 150), listening.ids(50));
          }
        });
  }

  @Test
  void resumesAfterTheLastEntryThatWasHeardWithoutAGapOrADouble() {
    note(10);
    assertTimeoutPreemptively(
        LIMIT,
        () -> {
          try (Listening first = new Listening("/api/v1/events")) {
            assertEquals(numbers(1, 7), first.ids(7));
          }
          note(20);
          try (Listening second = new Listening("/api/v1/events", "Last-Event-ID", "7")) {
            assertEquals(numbers(8, 30), second.ids(23));
            note(5);
            assertEquals(numbers(31, 35), second.ids(5));
          }
        });
  }

  @Test
  void losesNothingThatIsRecordedWhileSomebodyConnects() {
    assertTimeoutPreemptively(
        LIMIT,
        () -> {
          Thread recording = new Thread(() -> note(500));
          recording.start();
          try (Listening one = new Listening("/api/v1/events");
              Listening other = new Listening("/api/v1/events?after=0")) {
            assertEquals(numbers(1, 500), one.ids(500));
            assertEquals(numbers(1, 500), other.ids(500));
          }
          recording.join();
        });
  }

  @Test
  void tellsProgressWithoutANumberAndOnlyWhenItChanges() {
    served.submitOvernight();
    assertTimeoutPreemptively(
        LIMIT,
        () -> {
          try (Listening listening = new Listening("/api/v1/events?after=4")) {
            for (int job = 0; job < 8; job++) {
              Heard heard = listening.next();
              assertEquals("progress", heard.event());
              assertEquals("", heard.id());
            }
            served.desk.record(
                new Entry.JobChanged("vein", JobState.WITHDRAWN, Optional.empty(), "not needed"));
            Heard entry = listening.next();
            assertEquals(
                "{\"number\":5,\"at\":\"2031-03-12T18:10:00Z\",\"kind\":\"job-changed\","
                    + "\"job\":\"vein\",\"state\":\"withdrawn\",\"text\":\"not needed\"}",
                entry.data());
            Heard progress = listening.next();
            assertTrue(progress.data().contains("\"id\":\"vein\""), progress.data());
            assertTrue(progress.data().contains("\"state\":\"withdrawn\""), progress.data());
          }
        });
  }

  @ParameterizedTest
  @ValueSource(strings = {"x", "-1", "99999999999999999999"})
  void refusesWhatIsNoNumber(String id) {
    assertEquals(400, served.get("/api/v1/events", "Last-Event-ID", id).statusCode());
  }

  @Test
  void refusesANumberThatTheBooksDoNotHaveYet() {
    note(3);
    HttpResponse<String> answer = served.get("/api/v1/events", "Last-Event-ID", "4");
    assertEquals(409, answer.statusCode());
    assertEquals(
        "the books have 3 entries, and entry 4 was named: this is another store, or an older copy;"
            + " begin without Last-Event-ID",
        Served.json(answer).get("detail").asString());
  }

  @Test
  void endsWhenTheServerCloses() {
    note(1);
    assertTimeoutPreemptively(
        LIMIT,
        () -> {
          try (Listening listening = new Listening("/api/v1/events")) {
            assertEquals(numbers(1, 1), listening.ids(1));
            Thread closing = new Thread(served::close);
            closing.start();
            while (listening.next() != null) {
              // Whatever was still on its way.
            }
            closing.join();
            assertFalse(closing.isAlive());
          }
        });
  }

  @Test
  void survivesClientsThatComeAndGoWhileItIsBusy() {
    assertTimeoutPreemptively(
        Duration.ofSeconds(60),
        () -> {
          Thread recording = new Thread(() -> note(2_000));
          recording.start();
          for (int client = 0; client < 100; client++) {
            try (Listening listening = new Listening("/api/v1/events")) {
              assertNotNull(listening.next());
            }
          }
          recording.join();
          try (Listening last = new Listening("/api/v1/events?after=1990")) {
            assertEquals(numbers(1991, 2000), last.ids(10));
          }
        });
  }
}
