package beamwarden.store;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Region;
import beamwarden.beam.Scan;
import beamwarden.instrument.CurrentReading;
import beamwarden.ledger.Entry;
import beamwarden.quantity.Current;
import beamwarden.quantity.Voltage;
import beamwarden.queue.Acquisition;
import beamwarden.queue.Averaging;
import beamwarden.queue.Cap;
import java.io.IOException;
import java.io.InputStream;
import java.lang.reflect.RecordComponent;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.Collection;
import java.util.EnumSet;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Random;
import java.util.Set;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * Goal: books that were written once can be read for ever. Method: a file with a line for each
 * example of the day when its format was fixed, compared letter by letter. A change here means that
 * stored books change: raise the format and lift the old one. While no release holds the old form,
 * the file may be written anew with {@code -Dbeamwarden.golden=write}.
 */
class EntryJsonTest {
  private static final String GOLDEN = "entries-format-1.txt";

  private static String line(Entry entry) {
    return EntryKind.of(entry).text() + '\t' + EntryJson.write(entry);
  }

  private static List<String> golden() throws IOException {
    if ("write".equals(System.getProperty("beamwarden.golden"))) {
      Path file =
          Path.of(System.getProperty("beamwarden.root"))
              .resolve("scheduler/daemon/src/test/resources/beamwarden/store")
              .resolve(GOLDEN);
      return Files.readAllLines(
          Files.write(file, Examples.all().stream().map(EntryJsonTest::line).toList()));
    }
    try (InputStream file = EntryJsonTest.class.getResourceAsStream(GOLDEN)) {
      return new String(file.readAllBytes(), StandardCharsets.UTF_8).lines().toList();
    }
  }

  @Test
  void entriesAreWrittenAsTheyAlwaysWere() throws IOException {
    assertEquals(golden(), Examples.all().stream().map(EntryJsonTest::line).toList());
  }

  @Test
  void entriesAreReadAsTheyWereMeant() throws IOException {
    List<Entry> read =
        golden().stream()
            .map(line -> line.split("\t", 2))
            .map(parts -> EntryJson.read(parts[0], 1, parts[1]))
            .toList();
    assertEquals(Examples.all(), read);
  }

  @Test
  void everyKindOfEntryHasOneNameOfItsOwn() {
    Set<Class<?>> named =
        EnumSet.allOf(EntryKind.class).stream().map(EntryKind::type).collect(Collectors.toSet());
    assertEquals(Set.of(Entry.class.getPermittedSubclasses()), named);
    assertEquals(
        EntryKind.values().length,
        Arrays.stream(EntryKind.values()).map(EntryKind::text).distinct().count());
  }

  @Test
  void theExamplesHoldEveryKindOfValue() {
    Set<Object> seen = new HashSet<>();
    Examples.all().forEach(entry -> collect(entry, seen));
    Set<Object> wanted =
        Stream.of(
                Entry.class,
                Region.class,
                Scan.class,
                Acquisition.class,
                Cap.class,
                Averaging.class)
            .flatMap(closed -> Arrays.stream(closed.getPermittedSubclasses()))
            .collect(Collectors.toSet());
    seen.stream()
        .filter(Enum.class::isInstance)
        .flatMap(
            constant -> Arrays.stream(((Enum<?>) constant).getDeclaringClass().getEnumConstants()))
        .forEach(wanted::add);
    wanted.removeAll(seen);
    assertEquals(Set.of(), wanted, "what no example holds");
  }

  /** Adds every class of record and every constant that a value is made of. */
  private static void collect(Object value, Set<Object> into) {
    if (value instanceof Optional<?> optional) {
      optional.ifPresent(held -> collect(held, into));
    } else if (value instanceof Collection<?> all) {
      all.forEach(each -> collect(each, into));
    } else if (value instanceof Map<?, ?> map) {
      map.values().forEach(each -> collect(each, into));
    } else if (value instanceof Enum<?>) {
      into.add(value);
    } else if (value instanceof Record) {
      into.add(value.getClass());
      for (RecordComponent component : value.getClass().getRecordComponents()) {
        collect(component(value, component), into);
      }
    }
  }

  private static Object component(Object value, RecordComponent component) {
    try {
      return component.getAccessor().invoke(value);
    } catch (ReflectiveOperationException e) {
      throw new LinkageError(e.getMessage(), e);
    }
  }

  @ParameterizedTest
  @ValueSource(longs = {1, 2, 3})
  void everyDoubleComesBackAsItWas(long seed) {
    Random random = new Random(seed);
    BeamSettings beam = new BeamSettings(new Voltage(5000), new Current(1e-12));
    for (int round = 0; round < 5000; round++) {
      double value = Double.longBitsToDouble(random.nextLong());
      if (Double.isFinite(value)) {
        Entry entry = new Entry.CurrentMeasured(new CurrentReading(beam, new Current(value)));
        Entry back = EntryJson.read("current-measured", 1, EntryJson.write(entry));
        assertEquals(entry, back, () -> "seed " + seed + ", value " + value);
      }
    }
  }

  @ParameterizedTest
  @ValueSource(doubles = {0.0, -0.0, Double.MIN_VALUE, Double.MAX_VALUE, 0.1, 1.2345678901234567})
  void awkwardDoublesComeBackAsTheyWere(double value) {
    BeamSettings beam = new BeamSettings(new Voltage(5000), new Current(1e-12));
    Entry entry = new Entry.CurrentMeasured(new CurrentReading(beam, new Current(value)));
    assertEquals(entry, EntryJson.read("current-measured", 1, EntryJson.write(entry)));
  }

  @Test
  void refusesAKindOfANewerProgram() {
    Exception refusal =
        assertThrows(IllegalArgumentException.class, () -> EntryJson.read("warp-drive", 1, "{}"));
    assertEquals("this program knows no kind 'warp-drive'", refusal.getMessage());
  }

  @Test
  void refusesAFormatOfANewerProgram() {
    Exception refusal =
        assertThrows(IllegalArgumentException.class, () -> EntryJson.read("noted", 2, "{}"));
    assertEquals("its format is 2, and this program reads 1 to 1", refusal.getMessage());
  }

  @Test
  void refusesABodyThatLacksSomethingOrHasTooMuch() {
    assertThrows(
        IllegalArgumentException.class, () -> EntryJson.read("approved", 1, "{\"thing\":\"x\"}"));
    assertThrows(
        IllegalArgumentException.class,
        () -> EntryJson.read("approved", 1, "{\"thing\":\"x\",\"reason\":\"\",\"more\":1}"));
  }
}
