package beamwarden.kit;

import static org.junit.jupiter.api.Assertions.assertEquals;

import beamwarden.quantity.Current;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.time.Instant;
import java.util.List;
import java.util.OptionalLong;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class DeliveredStretchesTest {
  private static final Instant BEGAN = Instant.parse("2031-03-12T19:00:00Z");
  private static final String LINE =
      "{\"began\":\"2031-03-12T19:00:00Z\",\"ended\":\"%s\",\"grant\":%s,\"fence\":1,"
          + "\"sample\":\"sst-07\",\"shape\":\"%s\",\"centre_m\":[0,0],\"size_m\":[1e-5,1e-5],"
          + "\"turn_deg\":0,\"passes\":1,\"electrons\":2e9,\"current_A\":3.5e-10}\n";

  private final DeliveredStretches stretches = new DeliveredStretches(Duration.ofMillis(201));
  @TempDir Path folder;

  @Test
  void readsOneStretchFromEachLine() throws IOException {
    Instant ended = BEGAN.plusMillis(2 * 200 + 1);
    assertEquals(
        List.of(
            new Stretch(
                OptionalLong.of(3), BEGAN, ended, 2e9, new Current(3.5e-10), OptionalLong.of(2))),
        read(LINE.formatted(ended, "3", "rectangle")));
  }

  @Test
  void countsAPartOfALineAsOne() throws IOException {
    Instant ended = BEGAN.plusMillis(20);
    assertEquals(OptionalLong.of(1), read(LINE.formatted(ended, "3", "rectangle")).get(0).units());
  }

  @Test
  void countsASpotInNanoseconds() throws IOException {
    Instant ended = BEGAN.plusNanos(77);
    assertEquals(OptionalLong.of(77), read(LINE.formatted(ended, "3", "spot")).get(0).units());
  }

  @Test
  void readsBeamThatNobodyGranted() throws IOException {
    Instant ended = BEGAN.plusMillis(20);
    assertEquals(OptionalLong.empty(), read(LINE.formatted(ended, "null", "strip")).get(0).grant());
  }

  @Test
  void readsNothingWhereNothingWasDelivered() {
    assertEquals(List.of(), stretches.in(folder.resolve("delivered.jsonl")));
  }

  private List<Stretch> read(String lines) throws IOException {
    return stretches.in(Files.writeString(folder.resolve("delivered.jsonl"), lines));
  }
}
