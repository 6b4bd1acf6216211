package beamwarden.system;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Mode;
import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.Rectangle;
import beamwarden.ledger.MemoryJournal;
import beamwarden.profile.Profile;
import beamwarden.quantity.Current;
import beamwarden.quantity.Voltage;
import beamwarden.queue.Acquisition;
import beamwarden.queue.AtCap;
import beamwarden.queue.Job;
import beamwarden.queue.Queue;
import beamwarden.queue.Sample;
import beamwarden.run.Event;
import beamwarden.run.Rehearsal;
import beamwarden.simulated.DeliveredRecord;
import beamwarden.simulated.Hardware;
import beamwarden.simulated.MemoryRecord;
import beamwarden.simulated.Notes;
import beamwarden.simulated.SimulatedInstrument;
import beamwarden.simulated.Simulation;
import beamwarden.simulated.Stretch;
import beamwarden.timing.VirtualTime;
import java.time.Duration;
import java.time.Instant;
import java.time.ZoneId;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * Whole nights across a clock change: what the beam really did fills the true length of the night,
 * and none of it lies outside.
 *
 * <p>Each night is from 19:00 on a Saturday to 07:00 on the Sunday by the lab's own clock. Expected
 * instants are worked out by hand: in the European Union the clock changes at 01:00 UTC on the last
 * Sunday of March and of October (directive 2000/84/EC), in Newfoundland at 02:00 local time on the
 * second Sunday of March and the first of November, with a standard time of UTC-3:30.
 */
class ClockChangeNightsTest {
  private static final Duration WIND_DOWN = Duration.ofMinutes(10);

  /** Voltage, filter and stage; then a reading of the current. */
  private static final Duration LONGEST_PREPARATION = Duration.ofMinutes(6);

  /** A reading between two exposures, and the start of a frame. */
  private static final Duration LONGEST_PAUSE = Duration.ofSeconds(22);

  private static final Duration LINE = Duration.ofSeconds(1);

  @ParameterizedTest
  @CsvSource({
    "spring,   Europe/Ljubljana, 2024-03-30T18:00:00Z, 2024-03-31T05:00:00Z, 11",
    "autumn,   Europe/Ljubljana, 2024-10-26T17:00:00Z, 2024-10-27T06:00:00Z, 13",
    "midsummer, Europe/Ljubljana, 2024-06-22T17:00:00Z, 2024-06-23T05:00:00Z, 12",
    "spring,   America/St_Johns, 2024-03-09T22:30:00Z, 2024-03-10T09:30:00Z, 11",
    "autumn,   America/St_Johns, 2024-11-02T21:30:00Z, 2024-11-03T10:30:00Z, 13",
  })
  void exposuresFillTheTrueLengthOfTheNightAndNoneLiesOutside(
      String season, ZoneId zone, Instant opens, Instant closes, long hours) {
    assertEquals(Duration.ofHours(hours), Duration.between(opens, closes), season);
    List<Stretch> beam = rehearse(zone, opens, closes);
    Instant usableEnd = closes.minus(WIND_DOWN);
    Instant reached = opens.plus(LONGEST_PREPARATION);
    assertFalse(beam.get(0).began().isBefore(opens), beam.get(0).toString());
    for (Stretch stretch : beam) {
      assertFalse(stretch.began().isAfter(reached), "a pause until " + stretch);
      assertFalse(stretch.ended().isAfter(usableEnd), "too late: " + stretch);
      reached = stretch.ended().plus(LONGEST_PAUSE);
    }
    assertTrue(reached.plus(LINE).isAfter(usableEnd), "nothing after " + reached);
  }

  /** What the beam did between the afternoon before the night and the noon after it. */
  private static List<Stretch> rehearse(ZoneId zone, Instant opens, Instant closes) {
    VirtualTime time = new VirtualTime(opens.minus(Duration.ofHours(3)));
    MemoryRecord truth = DeliveredRecord.inMemory();
    Hardware hardware =
        Hardware.inMemory(Lab.abilities(), Simulation.inMemory(1).withoutNoise(), time, truth);
    Rehearsal rehearsal =
        new Rehearsal(
            Lab.setup(profile(zone)),
            Lab.abilities().instrument(),
            new MemoryJournal(Lab.STORE),
            new SimulatedInstrument(hardware, Notes.inMemory()),
            time);
    rehearsal.start();
    rehearsal.ask(new Event.Wish.Submit(endless(), ""));
    rehearsal.runUntilDone(closes.plus(Duration.ofHours(5)));
    return truth.stretchesFrom(0);
  }

  private static Profile profile(ZoneId zone) {
    Profile usual = Lab.profile();
    return new Profile(
        usual.abilities(),
        usual.adapter(),
        usual.options(),
        zone,
        WIND_DOWN,
        usual.shifts(),
        usual.retries());
  }

  /** A map of lines that take a second each, more than any night has. */
  private static Queue endless() {
    Sample sample =
        new Sample(
            "slab",
            "calcite slab",
            Optional.empty(),
            new Placement(new Point(0, 0), 0, 0),
            List.of(),
            List.of());
    Acquisition.Raster lines =
        new Acquisition.Raster(
            Mode.INTENSITY_MAP, 100, 60_000, LINE.dividedBy(100), List.of("red"), 1);
    Job job =
        new Job(
            "endless",
            sample.id(),
            lines,
            Rectangle.of(new Point(0, 0), 1e-4, 1e-4),
            new BeamSettings(new Voltage(8e3), new Current(350e-12)),
            Job.USUAL_PRIORITY,
            List.of(),
            AtCap.REFUSE,
            Optional.empty(),
            Optional.empty());
    return new Queue("endless", List.of(sample), List.of(job));
  }
}
