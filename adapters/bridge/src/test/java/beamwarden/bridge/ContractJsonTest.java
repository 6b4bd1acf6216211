package beamwarden.bridge;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.Mode;
import beamwarden.beam.Point;
import beamwarden.beam.Points;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.beam.Region;
import beamwarden.beam.Scan;
import beamwarden.beam.SpotScan;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.Instrument;
import beamwarden.instrument.ModeAbility;
import beamwarden.instrument.Receipt;
import beamwarden.quantity.Current;
import java.io.IOException;
import java.net.URI;
import java.net.URISyntaxException;
import java.nio.file.FileSystem;
import java.nio.file.FileSystems;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.stream.Stream;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;
import tools.jackson.core.JacksonException;
import tools.jackson.databind.json.JsonMapper;

class ContractJsonTest {
  private static final JsonMapper JSON = ContractJson.mapper();
  private static final int ROUNDS = 40;

  /** Every record and closed set that the contract's jar holds. */
  static List<Class<?>> contractTypes() throws IOException, URISyntaxException {
    URI place = Instrument.class.getProtectionDomain().getCodeSource().getLocation().toURI();
    Path root = Path.of(place);
    if (Files.isDirectory(root)) {
      return typesUnder(root);
    }
    try (FileSystem jar = FileSystems.newFileSystem(root)) {
      return typesUnder(jar.getPath("/"));
    }
  }

  private static List<Class<?>> typesUnder(Path root) throws IOException {
    List<Class<?>> types = new ArrayList<>();
    try (Stream<Path> files = Files.walk(root)) {
      for (Path file : files.filter(f -> f.toString().endsWith(".class")).sorted().toList()) {
        String name = root.relativize(file).toString().replace(".class", "").replace('/', '.');
        if (!name.endsWith("-info")) {
          Class<?> type = loaded(name);
          if (type.isRecord() || type.isSealed() || (type.isEnum() && !type.isAnonymousClass())) {
            types.add(type);
          }
        }
      }
    }
    types.removeIf(type -> type.getName().endsWith("AdapterProvider$Setting"));
    assertTrue(types.size() > 50, "found only " + types);
    return types;
  }

  private static Class<?> loaded(String name) {
    try {
      return Class.forName(name);
    } catch (ClassNotFoundException e) {
      throw new AssertionError(e);
    }
  }

  @ParameterizedTest
  @MethodSource("contractTypes")
  void carriesEveryTypeThereAndBackUnchanged(Class<?> type) {
    for (int seed = 0; seed < ROUNDS; seed++) {
      Object value = new RandomValues(seed).of(type);
      String text = JSON.writerFor(type).writeValueAsString(value);
      Object back = JSON.readValue(text, type);
      assertEquals(value, back, "seed " + seed + ": " + text);
      assertEquals(text, JSON.writerFor(type).writeValueAsString(back), "seed " + seed);
    }
  }

  @ParameterizedTest
  @CsvSource({
    "0, PT0S",
    "1, PT0.000000001S",
    "25000, PT0.000025S",
    "12500000000, PT12.5S",
    "43200000000000, PT43200S",
    "-1, PT-0.000000001S",
    "-1500000000, PT-1.5S",
    "-2000000000, PT-2S"
  })
  void writesDurationsInSecondsAlone(long nanos, String text) {
    Duration time = Duration.ofNanos(nanos);
    assertEquals('"' + text + '"', JSON.writeValueAsString(time));
    assertEquals(time, Duration.parse(text));
  }

  @Test
  void readsAnyDurationInIsoForm() {
    assertEquals(Duration.ofMinutes(90), JSON.readValue("\"PT1H30M\"", Duration.class));
  }

  @Test
  void writesInstantsInUtcToTheNanosecond() {
    Instant at = Instant.parse("2031-03-12T18:00:00.000000001Z");
    assertEquals("\"2031-03-12T18:00:00.000000001Z\"", JSON.writeValueAsString(at));
  }

  @Nested
  class Form {
    @Test
    void saysTheKindFirst() {
      Region region = new Points(List.of(new Point(0, 8e-6)));
      assertEquals(
          "{\"region\":\"points\",\"places\":[{\"xMetres\":0.0,\"yMetres\":8.0E-6}]}",
          JSON.writerFor(Region.class).writeValueAsString(region));
    }

    @Test
    void leavesTheKindAwayWhereItIsKnown() {
      Scan scan =
          new RasterScan(
              Rectangle.of(new Point(0, 0), 1e-6, 1e-6),
              2,
              2,
              0,
              1,
              Duration.ofNanos(1000),
              Duration.ZERO);
      assertEquals(
          "{\"scan\":\"raster\",\"frame\":{\"centre\":{\"xMetres\":0.0,\"yMetres\":0.0},"
              + "\"widthMetres\":1.0E-6,\"heightMetres\":1.0E-6,\"turnDegrees\":0.0},\"columns\":2,"
              + "\"rows\":2,\"firstRow\":0,\"rowCount\":1,\"dwell\":\"PT0.000001S\","
              + "\"flyback\":\"PT0S\"}",
          JSON.writerFor(Scan.class).writeValueAsString(scan));
    }

    @Test
    void writesConstantsInLowerCaseWithHyphens() {
      assertEquals("\"high-voltage-trip\"", JSON.writeValueAsString(FaultKind.HIGH_VOLTAGE_TRIP));
      for (Mode mode : Mode.values()) {
        assertEquals('"' + mode.text() + '"', JSON.writeValueAsString(mode));
      }
    }

    @Test
    void sortsTheKeysOfMaps() {
      Receipt receipt =
          JSON.readValue(
              "{\"grant\":1,\"fence\":1,\"unitsDone\":0,\"unitsTouched\":0,\"beamOn\":\"PT0S\","
                  + "\"counts\":{\"red\":3,\"green\":2,\"violet\":1},\"files\":[]}",
              Receipt.class);
      assertEquals(Map.of("red", 3L, "green", 2L, "violet", 1L), receipt.counts());
      assertTrue(
          JSON.writeValueAsString(receipt)
              .contains("\"counts\":{\"green\":2,\"red\":3,\"violet\":1}"));
    }

    @Test
    void readsTheKindWhereverItStands() {
      Scan scan =
          JSON.readValue(
              "{\"at\":{\"xMetres\":1,\"yMetres\":2},\"time\":\"PT30S\",\"scan\":\"spot\"}",
              Scan.class);
      assertEquals(new SpotScan(new Point(1, 2), Duration.ofSeconds(30)), scan);
    }
  }

  @Nested
  class Strictness {
    @Test
    void takesMissingAndNullForAbsent() {
      String start =
          "{\"shortestDwell\":\"PT1S\",\"longestDwell\":\"PT2S\",\"flyback\":\"PT0S\","
              + "\"frameStart\":\"PT0S\",\"stopsAt\":\"line\"";
      ModeAbility missing = JSON.readValue(start + "}", ModeAbility.class);
      assertTrue(missing.fieldMetres().isEmpty());
      assertEquals(missing, JSON.readValue(start + ",\"fieldMetres\":null}", ModeAbility.class));
    }

    @ParameterizedTest
    @ValueSource(
        strings = {
          "{\"xMetres\":1}",
          "{\"xMetres\":1,\"yMetres\":null}",
          "{\"xMetres\":1,\"yMetres\":2,\"zMetres\":3}",
          "{\"xMetres\":1,\"xMetres\":1,\"yMetres\":2}",
          "{\"xMetres\":\"1\",\"yMetres\":2}",
          "{\"xMetres\":\"NaN\",\"yMetres\":2}",
          "{\"xMetres\":NaN,\"yMetres\":2}",
          "{\"xMetres\":1e999,\"yMetres\":2}",
          "{\"xMetres\":true,\"yMetres\":2}",
          "{\"xMetres\":1,\"yMetres\":2} 3",
          "{\"xMetres\":1,\"yMetres\":2",
          "[1,2]",
          "null{",
          ""
        })
    void refusesAPointThatIsNotExactlyOne(String text) {
      assertThrows(JacksonException.class, () -> JSON.readValue(text, Point.class));
    }

    @ParameterizedTest
    @ValueSource(
        strings = {
          "{\"fate\":\"never begun\"}",
          "{\"fate\":\"NeverBegun\"}",
          "{}",
          "{\"fate\":\"unknown\",\"receipt\":null}",
          "{\"fate\":\"reported\"}",
          "{\"fate\":\"reported\",\"receipt\":null}",
          "{\"fate\":\"unknown\",\"fate\":\"never-begun\"}"
        })
    void refusesAFateThatIsNotExactlyOne(String text) {
      assertThrows(JacksonException.class, () -> JSON.readValue(text, GrantFate.class));
    }

    @ParameterizedTest
    @ValueSource(strings = {"1.5", "\"1\"", "1e3", "9223372036854775808", "true", "null"})
    void refusesACountThatIsNotAWholeNumber(String text) {
      String receipt =
          "{\"grant\":"
              + text
              + ",\"fence\":1,\"unitsDone\":0,\"unitsTouched\":0,\"beamOn\":\"PT0S\","
              + "\"counts\":{},\"files\":[]}";
      assertThrows(JacksonException.class, () -> JSON.readValue(receipt, Receipt.class));
    }

    @ParameterizedTest
    @ValueSource(strings = {"\"0.1\"", "1e999", "\"Infinity\"", "true"})
    void refusesAnOptionalNumberThatIsNone(String text) {
      String ability =
          "{\"shortestDwell\":\"PT1S\",\"longestDwell\":\"PT2S\",\"flyback\":\"PT0S\","
              + "\"frameStart\":\"PT0S\",\"stopsAt\":\"line\",\"fieldMetres\":"
              + text
              + "}";
      assertThrows(JacksonException.class, () -> JSON.readValue(ability, ModeAbility.class));
    }

    @ParameterizedTest
    @ValueSource(strings = {"12.5", "\"12.5 s\"", "\"PT\"", "\"\"", "null"})
    void refusesATimeThatIsNone(String text) {
      String spot =
          "{\"scan\":\"spot\",\"at\":{\"xMetres\":1,\"yMetres\":2},\"time\":" + text + "}";
      assertThrows(JacksonException.class, () -> JSON.readValue(spot, Scan.class));
    }

    @ParameterizedTest
    @ValueSource(strings = {"\"LINE\"", "\"Line\"", "0", "\"0\"", "\"\"", "null"})
    void refusesAConstantThatIsNone(String text) {
      String ability =
          "{\"shortestDwell\":\"PT1S\",\"longestDwell\":\"PT2S\",\"flyback\":\"PT0S\","
              + "\"frameStart\":\"PT0S\",\"stopsAt\":"
              + text
              + "}";
      assertThrows(JacksonException.class, () -> JSON.readValue(ability, ModeAbility.class));
    }

    @Test
    void refusesWhatARecordRefuses() {
      JacksonException refused =
          assertThrows(
              JacksonException.class,
              () ->
                  JSON.readValue(
                      "{\"scan\":\"spot\",\"at\":{\"xMetres\":1,\"yMetres\":2},\"time\":\"PT0S\"}",
                      Scan.class));
      assertTrue(refused.getOriginalMessage().contains("a spot needs a time above zero"));
    }

    @Test
    void refusesToWriteWhatIsNoNumber() {
      record Loose(double value) {}
      assertThrows(JacksonException.class, () -> JSON.writeValueAsString(new Loose(Double.NaN)));
    }
  }

  @Test
  void takesFurtherTypesWithTheSameRules() {
    record Noted(String what, Current current, Rectangle where) {}
    JsonMapper further = ContractJson.builder().build();
    Noted noted = new Noted("x", new Current(1e-9), Rectangle.of(new Point(0, 0), 1, 2));
    String text = further.writeValueAsString(noted);
    assertTrue(
        text.startsWith("{\"what\":\"x\",\"current\":{\"amperes\":1.0E-9},\"where\":{"), text);
    assertEquals(noted, further.readValue(text, Noted.class));
  }
}
