package beamwarden.simulated;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.Exposure;
import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.SpotScan;
import beamwarden.instrument.AdapterProvider;
import beamwarden.instrument.DataFile;
import beamwarden.instrument.Grant;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.Instrument;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.Receipt;
import beamwarden.timing.VirtualTime;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.ServiceLoader;
import java.util.Set;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The instrument as a daemon or a process of its own opens it: notes on disk, found by name. */
class ProviderTest {
  private static final Instant EVENING = Session.EVENING;

  @TempDir Path folder;
  private VirtualTime time = new VirtualTime(EVENING);
  private final List<InstrumentEvent> heard = new ArrayList<>();
  private long fence;

  @Test
  void isFoundByItsName() {
    assertTrue(
        ServiceLoader.load(AdapterProvider.class).stream()
            .anyMatch(found -> found.get().name().equals("simulated")));
  }

  @Test
  void refusesAnOptionThatItDoesNotKnow() {
    IllegalArgumentException refusal =
        assertThrows(IllegalArgumentException.class, () -> open(Map.of("sede", "3")));
    assertEquals(
        "the simulated instrument has no option 'sede': it knows data, faults, noise, notes, seed",
        refusal.getMessage());
  }

  @Test
  void keepsNothingOnDiskWhenToldSo() throws IOException {
    Instrument instrument = open(Map.of("notes", "memory"));
    exposeSpot(instrument, 1, Duration.ofSeconds(30));
    pass(Duration.ofMinutes(1));
    assertEquals(1, receipts().size());
    try (var files = Files.list(folder)) {
      assertEquals(0, files.count());
    }
  }

  @Test
  void writesTheTruthAsOneLineOfJson() throws IOException {
    exposeSpot(open(Map.of("noise", "off")), 1, Duration.ofSeconds(30));
    pass(Duration.ofMinutes(1));
    List<String> lines = truth();
    assertEquals(1, lines.size());
    // 15 pA for 30 s: N = I·t/e = 2808679083.5 (e from the SI Brochure, 9th edition).
    assertEquals(
        "{\"began\":\"2031-03-12T18:15:00Z\",\"ended\":\"2031-03-12T18:15:30Z\",\"grant\":1,"
            + "\"fence\":1,\"sample\":\"sst-07\",\"shape\":\"spot\",\"centre_m\":[0.0,8.0E-6],"
            + "\"size_m\":[6.0E-9,6.0E-9],\"turn_deg\":0.0,\"passes\":1,"
            + "\"electrons\":2.8086790835073433E9,\"current_A\":1.5E-11}",
        lines.get(0));
  }

  @Test
  void remembersFenceReceiptAndSessionAcrossProcesses() {
    exposeSpot(open(Map.of("noise", "off")), 1, Duration.ofSeconds(30));
    pass(Duration.ofMinutes(1));
    String session = last(InstrumentEvent.Connected.class).session();
    laterProcess(Duration.ofHours(1));
    Instrument again = open(Map.of("noise", "off"));
    connect(again);
    assertEquals(session, last(InstrumentEvent.Connected.class).session());
    again.seal(1, "another", Set.of(), false);
    seal(again, Set.of(1L));
    assertEquals(
        new InstrumentEvent.SealRefused(1, Session.STORE), last(InstrumentEvent.SealRefused.class));
    assertEquals(new GrantFate.Reported(receipts().get(0)), fates().get(1L));
  }

  @Test
  void aScanThatRanOnWithoutItsProcessIsInTheTruthAtTheNextStart() throws IOException {
    exposeSpot(open(Map.of("noise", "off")), 1, Duration.ofMinutes(10));
    pass(Duration.ofMinutes(1));
    laterProcess(Duration.ofHours(1));
    Instrument again = open(Map.of("noise", "off"));
    assertTrue(truth().get(0).contains("\"ended\":\"2031-03-12T18:25:00Z\""), truth()::toString);
    connect(again);
    seal(again, Set.of(1L));
    assertEquals(new GrantFate.Unknown(), fates().get(1L));
  }

  @Test
  void aScanThatStillRunsAtTheNextStartIsBlanked() throws IOException {
    exposeSpot(open(Map.of("noise", "off")), 1, Duration.ofMinutes(10));
    pass(Duration.ofMinutes(1));
    laterProcess(Duration.ofMinutes(2));
    open(Map.of("noise", "off"));
    pass(Duration.ofHours(1));
    assertEquals(1, truth().size());
    assertTrue(truth().get(0).contains("\"ended\":\"2031-03-12T18:18:00Z\""), truth()::toString);
  }

  @Test
  void theTruthIsNotWrittenTwiceWhenTheProcessEndedRightAfterWritingIt() throws IOException {
    exposeSpot(open(Map.of("noise", "off")), 1, Duration.ofMinutes(10));
    String running = Files.readString(folder.resolve("hardware.notes"));
    pass(Duration.ofMinutes(20));
    Files.writeString(folder.resolve("hardware.notes"), running);
    laterProcess(Duration.ofHours(1));
    open(Map.of("noise", "off"));
    assertEquals(1, truth().size());
  }

  @Test
  void aScriptedDeathIsSurvivedByTheSameFolder() throws IOException {
    Map<String, String> options = Map.of("noise", "off", "faults", "process-dies@grant:1");
    exposeSpot(open(options), 1, Duration.ofMinutes(10));
    pass(Duration.ofMinutes(7));
    assertEquals(1, all(InstrumentEvent.Lost.class).size());
    Instrument again = open(options);
    pass(Duration.ofHours(1));
    assertEquals(1, truth().size());
    exposeSpot(again, 2, Duration.ofMinutes(1));
    pass(Duration.ofMinutes(20));
    assertEquals(2, truth().size());
    assertEquals(1, receipts().size());
  }

  @Test
  void aTornLastNoteIsCutAway() throws IOException {
    exposeSpot(open(Map.of("noise", "off")), 1, Duration.ofSeconds(30));
    pass(Duration.ofMinutes(1));
    Path notes = folder.resolve("adapter.notes");
    Files.writeString(notes, "kept 1 1 30000", StandardOpenOption.APPEND);
    laterProcess(Duration.ofHours(1));
    Instrument again = open(Map.of("noise", "off"));
    connect(again);
    seal(again, Set.of(1L));
    assertEquals(new GrantFate.Reported(receipts().get(0)), fates().get(1L));
  }

  @Test
  void aDamagedNoteIsRefused() throws IOException {
    exposeSpot(open(Map.of("noise", "off")), 1, Duration.ofSeconds(30));
    Path notes = folder.resolve("adapter.notes");
    Files.writeString(notes, Files.readString(notes).replace("begun 1", "begun 7"));
    assertThrows(IllegalArgumentException.class, () -> open(Map.of("noise", "off")));
  }

  @Test
  void hardwareThatLostItsMemoryBeginsAnotherSession() throws IOException {
    connect(open(Map.of("noise", "off")));
    String before = last(InstrumentEvent.Connected.class).session();
    Files.writeString(folder.resolve("hardware.notes"), "not what was written\n");
    laterProcess(Duration.ofHours(1));
    connect(open(Map.of("noise", "off")));
    assertNotEquals(before, last(InstrumentEvent.Connected.class).session());
  }

  @Test
  void dataIsOnDiskBeforeItsReceipt() throws IOException {
    exposeSpot(open(Map.of()), 1, Duration.ofSeconds(30));
    pass(Duration.ofMinutes(1));
    List<DataFile> files = receipts().get(0).files();
    assertEquals(2, files.size());
    for (DataFile file : files) {
      assertEquals(file.bytes(), Files.size(Path.of(file.path())));
    }
    assertEquals(
        receipts().get(0).counts().get("photons"),
        Files.readAllLines(Path.of(files.get(0).path())).stream()
            .skip(1)
            .mapToLong(line -> Long.parseLong(line.substring(line.indexOf(',') + 1)))
            .sum());
  }

  @Test
  void withoutNoiseNoDataIsWritten() {
    exposeSpot(open(Map.of("noise", "off", "data", "on")), 1, Duration.ofSeconds(30));
    pass(Duration.ofMinutes(1));
    assertEquals(List.of(), receipts().get(0).files());
    assertFalse(Files.exists(folder.resolve("data")));
  }

  private Instrument open(Map<String, String> options) {
    AdapterProvider.Setting setting = new AdapterProvider.Setting(Lab.abilities(), folder, options);
    return new SimulatedProvider().open(setting, time);
  }

  /** The old line of time stands still for ever, as a killed process does. */
  private void laterProcess(Duration later) {
    time = new VirtualTime(time.instant().plus(later));
  }

  private void connect(Instrument instrument) {
    instrument.connect(heard::add);
    pass(Duration.ZERO);
  }

  private void seal(Instrument instrument, Set<Long> grants) {
    instrument.seal(++fence, Session.STORE, grants, false);
    pass(Duration.ZERO);
  }

  private void exposeSpot(Instrument instrument, long number, Duration length) {
    connect(instrument);
    seal(instrument, Set.of());
    instrument.prepare(1, Lab.COUNTING, Lab.MIDDLE);
    pass(Duration.ofMinutes(15));
    instrument.heartbeat(1);
    instrument.begin(grant(number, length));
    pass(Duration.ZERO);
  }

  private Grant grant(long number, Duration length) {
    SpotScan scan = new SpotScan(new Point(0, 8e-6), length);
    Exposure exposure =
        new Exposure(
            "emitter",
            0,
            "sst-07",
            new Placement(new Point(0, -8e-6), 0, 3e-6),
            Lab.COUNTING,
            scan);
    return new Grant(
        number,
        Session.STORE,
        fence,
        last(InstrumentEvent.Connected.class).session(),
        exposure,
        length.plusSeconds(1),
        Session.highest(Lab.COUNTING),
        1,
        Duration.ofMinutes(1),
        Duration.ofHours(1),
        "head");
  }

  private void pass(Duration length) {
    time.runUntil(time.instant().plus(length));
  }

  private List<String> truth() throws IOException {
    Path file = folder.resolve("delivered.jsonl");
    return Files.exists(file) ? Files.readAllLines(file) : List.of();
  }

  private List<Receipt> receipts() {
    return all(InstrumentEvent.Ended.class).stream().map(InstrumentEvent.Ended::receipt).toList();
  }

  private Map<Long, GrantFate> fates() {
    return last(InstrumentEvent.Sealed.class).report().fates();
  }

  private <E extends InstrumentEvent> List<E> all(Class<E> kind) {
    return heard.stream().filter(kind::isInstance).map(kind::cast).toList();
  }

  private <E extends InstrumentEvent> E last(Class<E> kind) {
    List<E> all = all(kind);
    return all.get(all.size() - 1);
  }
}
