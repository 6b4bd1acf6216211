package beamwarden.ledger;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Conditions;
import beamwarden.beam.Exposure;
import beamwarden.beam.Mode;
import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.dose.Delivery;
import beamwarden.dose.Tolerances;
import beamwarden.instrument.Receipt;
import beamwarden.quantity.Current;
import beamwarden.quantity.Voltage;
import beamwarden.queue.Acquisition;
import beamwarden.queue.AtCap;
import beamwarden.queue.HeldFor;
import beamwarden.queue.Job;
import beamwarden.queue.JobState;
import beamwarden.queue.Queue;
import beamwarden.queue.Sample;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.junit.jupiter.api.Test;

/** What entries say, taken together. */
class BooksTest {
  private static final Instant AT = Instant.parse("2031-03-12T20:00:00Z");
  private static final Placement PLACED = new Placement(new Point(0, 0), 0, 0);
  private static final BeamSettings BEAM = new BeamSettings(new Voltage(8e3), new Current(1e-9));
  private static final Rectangle FRAME = Rectangle.of(new Point(0, 0), 1e-5, 1e-5);
  private static final Tolerances EXACT = new Tolerances(0, 0, 0, Duration.ZERO, true, 0);

  private final List<Recorded> entries = new ArrayList<>();

  private Books books() {
    return Books.of(entries);
  }

  private void write(Entry entry) {
    entries.add(new Recorded(entries.size() + 1, AT.plusSeconds(entries.size()), 1, entry, "h"));
  }

  private void submit() {
    Acquisition.Raster raster =
        new Acquisition.Raster(
            Mode.INTENSITY_MAP, 10, 100, Duration.ofMillis(1), List.of("green"), 1);
    Job job =
        new Job(
            "map",
            "slab",
            raster,
            FRAME,
            BEAM,
            5,
            List.of(),
            AtCap.REFUSE,
            Optional.empty(),
            Optional.empty());
    Sample sample = new Sample("slab", "a slab", Optional.empty(), PLACED, List.of(), List.of());
    write(new Entry.QueueSubmitted(new Queue("q", List.of(sample), List.of(job)), ""));
    write(new Entry.SampleDeclared(sample, ""));
  }

  private static Delivery lines(long grant, int first, int count) {
    RasterScan scan =
        new RasterScan(FRAME, 10, 100, first, count, Duration.ofMillis(1), Duration.ZERO);
    Exposure exposure =
        new Exposure(
            "map", 0, "slab", PLACED, new Conditions(BEAM, Mode.INTENSITY_MAP, "green"), scan);
    Current current = new Current(1e-9);
    return new Delivery(
        grant, 1, exposure, count, scan.beamOn(), scan.beamOn(), current, current, EXACT);
  }

  private static Receipt receipt(Delivery delivery) {
    long units = delivery.exposure().scan().units();
    return new Receipt(
        delivery.grant(),
        1,
        units,
        units,
        delivery.bestBeamOn(),
        Optional.empty(),
        Optional.empty(),
        Map.of(),
        List.of(),
        Optional.empty());
  }

  private void open(Delivery delivery) {
    write(new Entry.GrantOpened(delivery, delivery.upperBeamOn(), "session"));
  }

  private void book(Delivery delivery) {
    write(new Entry.GrantBooked(delivery, receipt(delivery)));
  }

  private double coulombs() {
    return books().sample("slab").orElseThrow().dose().upper().coulombs();
  }

  @Test
  void countsAnOpenGrantInFullAndAVoidOneNotAtAll() {
    submit();
    open(lines(1, 0, 50));
    assertEquals(50 * 10 * 1e-3 * 1e-9, coulombs(), 1e-18);
    write(new Entry.GrantVoided(1, "slab", false, "never sent"));
    assertEquals(0, coulombs());
    assertTrue(books().unresolved().isEmpty());
    assertEquals(1, books().lastGrant());
  }

  @Test
  void aReceiptLearntLateAddsItsDoseAndNoProgress() {
    submit();
    open(lines(1, 0, 50));
    write(new Entry.GrantPresumed(lines(1, 0, 50), "the adapter cannot say", Optional.empty()));
    open(lines(2, 0, 50));
    book(lines(2, 0, 50));
    assertEquals(50, books().job("map").orElseThrow().done().units(0));
    book(lines(1, 0, 50));
    assertEquals(50, books().job("map").orElseThrow().done().units(0));
    assertEquals(2 * 50 * 10 * 1e-3 * 1e-9, coulombs(), 1e-18);
  }

  @Test
  void aPresumedGrantStaysCountedAndIsAskedAboutAgain() {
    submit();
    open(lines(1, 0, 50));
    write(new Entry.GrantPresumed(lines(1, 0, 50), "the adapter cannot say", Optional.empty()));
    assertEquals(GrantState.PRESUMED, books().unresolved().get(1L).state());
    assertEquals(50 * 10 * 1e-3 * 1e-9, coulombs(), 1e-18);
  }

  @Test
  void aGrantWhoseReceiptWasNotBelievedIsNotAskedAboutAgain() {
    submit();
    Delivery inFull = lines(1, 0, 50);
    open(inFull);
    write(new Entry.GrantPresumed(inFull, "contradicts", Optional.of(receipt(inFull))));
    assertTrue(books().unresolved().isEmpty());
    assertEquals(50 * 10 * 1e-3 * 1e-9, coulombs(), 1e-18);
  }

  @Test
  void aJobThatAPersonLetGoOnNoLongerMindsItsPredecessor() {
    submit();
    write(
        new Entry.JobChanged(
            "map", JobState.HELD, Optional.of(HeldFor.PREDECESSOR), "survey is refused"));
    write(new Entry.JobChanged("map", JobState.WAITING, Optional.empty(), "released"));
    assertTrue(books().job("map").orElseThrow().letGoOn());
  }

  @Test
  void areTheSameWhenReadAtOnceOrOneByOne() {
    submit();
    open(lines(1, 0, 50));
    book(lines(1, 0, 50));
    open(lines(2, 50, 50));
    Books oneByOne = Books.EMPTY;
    for (Recorded entry : entries) {
      oneByOne = oneByOne.with(List.of(entry));
    }
    assertEquals(books().job("map"), oneByOne.job("map"));
    assertEquals(books().unresolved(), oneByOne.unresolved());
    assertEquals(books().lastAt(), oneByOne.lastAt());
    assertEquals(coulombs(), oneByOne.sample("slab").orElseThrow().dose().upper().coulombs());
  }
}
