package beamwarden.dose;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.Conditions;
import beamwarden.beam.Exposure;
import beamwarden.beam.Line;
import beamwarden.beam.Mode;
import beamwarden.beam.Mosaic;
import beamwarden.beam.RasterScan;
import beamwarden.beam.SpotScan;
import beamwarden.queue.Acquisition;
import beamwarden.queue.Job;
import beamwarden.queue.Sample;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;

class ExposuresTest {
  private static final Sample SAMPLE = Fixtures.quartz();
  private static final Mosaic TWO_TILES =
      new Mosaic(2, 1, 100e-6, 100e-6, 0.1, Fixtures.point(0, 0), 0);

  /** 1 ms a line of 100 pixels and 0.2 ms of flyback. */
  private static final Duration DWELL = Duration.ofNanos(10_000);

  @Nested
  class Passes {
    @Test
    void areMadeForEachTileForEachFrameForEachFilter() {
      Job job = Fixtures.map(TWO_TILES, 100, 50, DWELL, 3, "green", "red");
      assertEquals(12, Exposures.passes(job));
      List<Pass> passes = new ArrayList<>();
      for (int number = 0; number < 12; number++) {
        passes.add(Exposures.pass(job, number, Fixtures.exact()));
      }
      assertEquals(
          List.of("green", "red", "green", "red", "green", "red"),
          passes.subList(0, 6).stream().map(Pass::filter).toList());
      assertEquals(0, passes.get(5).place());
      assertEquals(1, passes.get(6).place());
      assertEquals(TWO_TILES.tiles().get(1), passes.get(6).frame().orElseThrow());
    }

    @Test
    void areMadeAtEachPoint() {
      Job job = Fixtures.count(Duration.ofMinutes(5), Fixtures.point(1, 2), Fixtures.point(3, 4));
      assertEquals(2, Exposures.passes(job));
      Pass second = Exposures.pass(job, 1, Fixtures.exact());
      assertEquals(new SpotScan(Fixtures.point(3, 4), Duration.ofMinutes(5)), second.whole());
      assertEquals(Conditions.PANCHROMATIC, second.filter());
    }

    @Test
    void thatDoNotExistAreRefused() {
      Job job = Fixtures.map(TWO_TILES, 100, 50, DWELL, 1, "green");
      assertEquals(
          "job survey has 2 passes, none with number 2",
          assertThrows(
                  IllegalArgumentException.class, () -> Exposures.pass(job, 2, Fixtures.exact()))
              .getMessage());
    }

    @Test
    void alongALineAreRefused() {
      Job job =
          Fixtures.map(
              new Line(Fixtures.point(0, 0), Fixtures.point(1, 0)), 100, 50, DWELL, 1, "green");
      assertEquals(
          "job survey cannot be exposed: a raster needs a rectangle or a mosaic as its region,"
              + " not a line",
          assertThrows(IllegalArgumentException.class, () -> Exposures.passes(job)).getMessage());
    }

    @Test
    void ofAModeThatTheInstrumentLacksAreRefused() {
      Job job =
          Fixtures.job(
              new Acquisition.Raster(Mode.SPECTRAL_MAP, 10, 10, DWELL, List.of("green"), 1),
              Fixtures.square(0, 0, 10, 10),
              1e-9);
      assertEquals(
          "job survey needs the mode spectral-map, which the instrument north-room does not offer",
          assertThrows(
                  IllegalArgumentException.class, () -> next(job, Done.NOTHING, Optional.empty()))
              .getMessage());
    }
  }

  @Nested
  class TheNextExposure {
    @Test
    void isAWholePassWhenItIsShort() {
      Job job = Fixtures.map(TWO_TILES, 100, 50, DWELL, 1, "green", "red");
      Exposure next = next(job, Done.NOTHING.plus(0, 50), Optional.empty()).orElseThrow();
      assertEquals(1, next.pass());
      assertEquals("red", next.conditions().filter());
      assertEquals(50, next.scan().units());
      assertEquals(Fixtures.PLACED, next.placement());
      assertEquals(Duration.ofNanos(200_000), ((RasterScan) next.scan()).flyback());
    }

    @Test
    void takesTheLinesOfAboutAMinuteAlikeInNumber() {
      // A line takes 2.4 s, 25 of them 60 s; 60 lines are cut into 20, 20 and 20.
      Job job =
          Fixtures.map(
              Fixtures.square(0, 0, 10, 10), 100, 60, Duration.ofNanos(23_998_000), 1, "green");
      assertEquals(List.of(20L, 20L, 20L), unitsOf(job));
    }

    @Test
    void beginsAtTheFirstLineThatIsNotDone() {
      Job job = Fixtures.map(TWO_TILES, 100, 50, DWELL, 1, "green");
      RasterScan scan =
          (RasterScan) next(job, Done.NOTHING.plus(0, 17), Optional.empty()).orElseThrow().scan();
      assertEquals(17, scan.firstRow());
      assertEquals(33, scan.rowCount());
    }

    @Test
    void isOneLineWhenALineTakesLonger() {
      Job job =
          Fixtures.map(Fixtures.square(0, 0, 10, 10), 100, 3, Duration.ofSeconds(1), 1, "green");
      assertEquals(List.of(1L, 1L, 1L), unitsOf(job));
    }

    @Test
    void isASliceOfThirtySecondsAtAPoint() {
      Job job = Fixtures.count(Duration.ofSeconds(70), Fixtures.point(1, 2));
      List<Long> units = unitsOf(job);
      assertEquals(3, units.size());
      assertEquals(70_000_000_000L, units.stream().mapToLong(unit -> unit).sum());
      assertTrue(units.stream().allMatch(unit -> unit <= 30_000_000_000L));
    }

    @Test
    void isEmptyWhenAllIsDone() {
      Job job = Fixtures.map(TWO_TILES, 100, 50, DWELL, 1, "green");
      assertEquals(
          Optional.empty(), next(job, Done.NOTHING.plus(0, 50).plus(1, 50), Optional.empty()));
    }

    @Test
    void fitsIntoTheTimeThereIs() {
      Job job = Fixtures.map(TWO_TILES, 100, 50, DWELL, 1, "green");
      assertEquals(8, within(job, Duration.ofMillis(10)).orElseThrow().scan().units());
      assertEquals(50, within(job, Duration.ofHours(1)).orElseThrow().scan().units());
      assertEquals(Optional.empty(), within(job, Duration.ofMillis(1)));
      assertEquals(Optional.empty(), within(job, Duration.ofMillis(-5)));
    }

    @Test
    void atAPointIsNoShorterThanTheShortestSlice() {
      Job job = Fixtures.count(Duration.ofSeconds(70), Fixtures.point(1, 2));
      assertEquals(
          2_500_000_000L, within(job, Duration.ofMillis(2500)).orElseThrow().scan().units());
      assertEquals(Optional.empty(), within(job, Duration.ofMillis(900)));
    }
  }

  @Nested
  class ATrimmedJob {
    private final Job job = Fixtures.map(TWO_TILES, 100, 50, DWELL, 3, "green", "red");

    @Test
    void keepsTheFirstFramesOfEveryTileWithEveryFilter() {
      List<Integer> passes =
          all(job, Optional.of(new Trim(50, 8))).stream().map(Exposure::pass).toList();
      assertEquals(List.of(0, 1, 2, 3, 6, 7, 8, 9), passes);
    }

    @Test
    void keepsTheSameFirstLinesOfEveryPass() {
      List<Exposure> exposures = all(job, Optional.of(new Trim(7, 4)));
      assertEquals(List.of(0, 1, 6, 7), exposures.stream().map(Exposure::pass).toList());
      assertTrue(exposures.stream().allMatch(exposure -> exposure.scan().units() == 7));
    }
  }

  @Nested
  class WhatRemains {
    @Test
    void isWhatTheExposuresAddUpTo() {
      Job job = Fixtures.map(TWO_TILES, 100, 60, Duration.ofNanos(11_998_000), 2, "green", "red");
      Done done = Done.NOTHING.plus(0, 60).plus(1, 13);
      Work work = Exposures.remaining(job, Fixtures.exact(), done, Optional.empty());
      List<Exposure> exposures = all(job, done, Optional.empty());
      assertEquals(exposures.size(), work.exposures());
      assertEquals(7, work.passes());
      assertEquals(60 * 6 + 47, work.units());
      assertEquals(
          exposures.stream().map(e -> e.scan().beamOn()).reduce(Duration.ZERO, Duration::plus),
          work.beamOn());
      assertEquals(
          exposures.stream().map(e -> e.scan().duration()).reduce(Duration.ZERO, Duration::plus),
          work.duration());
    }

    @Test
    void isNothingWhenAllIsDone() {
      Job job = Fixtures.count(Duration.ofSeconds(70), Fixtures.point(1, 2));
      Done done = Done.NOTHING.plus(0, 70_000_000_000L);
      assertEquals(Work.NONE, Exposures.remaining(job, Fixtures.exact(), done, Optional.empty()));
    }
  }

  private static List<Long> unitsOf(Job job) {
    return all(job, Optional.empty()).stream().map(exposure -> exposure.scan().units()).toList();
  }

  private static List<Exposure> all(Job job, Optional<Trim> limit) {
    return all(job, Done.NOTHING, limit);
  }

  private static List<Exposure> all(Job job, Done from, Optional<Trim> limit) {
    List<Exposure> exposures = new ArrayList<>();
    Done done = from;
    Optional<Exposure> next = next(job, done, limit);
    while (next.isPresent()) {
      exposures.add(next.get());
      done = done.plus(next.get().pass(), next.get().scan().units());
      next = next(job, done, limit);
    }
    return exposures;
  }

  private static Optional<Exposure> next(Job job, Done done, Optional<Trim> limit) {
    return Exposures.next(job, SAMPLE, Fixtures.exact(), done, limit);
  }

  private static Optional<Exposure> within(Job job, Duration longest) {
    return Exposures.next(job, SAMPLE, Fixtures.exact(), Done.NOTHING, Optional.empty(), longest);
  }
}
