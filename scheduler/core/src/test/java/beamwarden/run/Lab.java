package beamwarden.run;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Mode;
import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.Points;
import beamwarden.beam.Rectangle;
import beamwarden.beam.Region;
import beamwarden.dose.Exposures;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.Column;
import beamwarden.instrument.CurrentMeter;
import beamwarden.instrument.Field;
import beamwarden.instrument.Filter;
import beamwarden.instrument.ModeAbility;
import beamwarden.instrument.Stage;
import beamwarden.plan.PriorityPlanner;
import beamwarden.profile.Profile;
import beamwarden.quantity.Charge;
import beamwarden.quantity.Current;
import beamwarden.quantity.Length;
import beamwarden.quantity.Voltage;
import beamwarden.queue.Acquisition;
import beamwarden.queue.AtCap;
import beamwarden.queue.Cap;
import beamwarden.queue.Job;
import beamwarden.queue.Sample;
import beamwarden.shift.ShiftCalendar;
import beamwarden.shift.ShiftRule;
import java.time.DayOfWeek;
import java.time.Duration;
import java.time.Instant;
import java.time.LocalTime;
import java.time.ZoneOffset;
import java.util.EnumSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalLong;

/**
 * An invented lab whose figures are easy to work out by hand.
 *
 * <p>Its clock shows UTC; a shift is open each night from 19:00 to 07:00 and winds down from 06:50.
 * A map has 90 lines and is cut into three exposures of 30 lines each. The current is 100 pA, and
 * at most 100 pA · 1.03 · 1.1 by the meter's tolerance and the drift. A change of beam takes a
 * minute, a reading 20 s.
 */
final class Lab {
  static final String STORE = "store-of-tests";

  /** A Wednesday, an hour after the night's shift has opened. */
  static final Instant EVENING = Instant.parse("2031-03-12T20:00:00Z");

  static final Instant WIND_DOWN = Instant.parse("2031-03-13T06:50:00Z");

  static final BeamSettings BEAM = new BeamSettings(new Voltage(10_000), new Current(100e-12));

  /** How long an exposure of a map or a count takes. */
  static final Duration EXPOSURE = Exposures.USUAL_LENGTH;

  static final Duration LINE = EXPOSURE.dividedBy(30);

  /** The upper value of the charge of an exposure; the blanker is as quick as can be. */
  static final double UPPER_COULOMBS = EXPOSURE.toSeconds() * 100e-12 * 1.03 * 1.1;

  static final int RETRIES = 2;

  private Lab() {}

  static Abilities abilities() {
    ModeAbility lines = mode(1_000, ModeAbility.Boundary.LINE);
    ModeAbility slices = mode(1_000_000_000L, ModeAbility.Boundary.SLICE);
    return new Abilities(
        "north-room",
        new Stage(-0.025, 0.025, -0.025, 0.025, 1e-3, 1e-2, Duration.ofSeconds(2), 1e-6),
        new Field(5e-4, 0),
        new Column(
            new Voltage(1_000),
            new Voltage(30_000),
            Duration.ofSeconds(10),
            new Current(2e-12),
            new Current(4e-8),
            Duration.ofSeconds(10)),
        new CurrentMeter(0.03, new Current(0), 0.1, Duration.ofHours(1), Duration.ofSeconds(5)),
        new Blanker(Blanker.Kind.FAST, Optional.of(Duration.ZERO)),
        Map.of("red", new Filter(new Length(600e-9), new Length(680e-9))),
        Duration.ofSeconds(4),
        Map.of(Mode.INTENSITY_MAP, lines, Mode.PHOTON_CORRELATION, slices),
        List.of());
  }

  private static ModeAbility mode(long shortestNanos, ModeAbility.Boundary stopsAt) {
    return new ModeAbility(
        Duration.ofNanos(shortestNanos),
        EXPOSURE,
        OptionalDouble.empty(),
        Duration.ZERO,
        Duration.ZERO,
        stopsAt);
  }

  static ShiftRule.Hours night() {
    return night(Optional.empty(), Optional.empty());
  }

  static ShiftRule.Hours night(Optional<LocalTime> latestStart, Optional<Duration> beamOnBudget) {
    return new ShiftRule.Hours(
        LocalTime.of(19, 0), LocalTime.of(7, 0), true, Optional.empty(), latestStart, beamOnBudget);
  }

  static RunSetup setup(ShiftRule.Hours hours) {
    Profile profile =
        new Profile(
            abilities(),
            "by-hand",
            Map.of(),
            ZoneOffset.UTC,
            Duration.ofMinutes(10),
            List.of(new ShiftRule.Weekly(EnumSet.allOf(DayOfWeek.class), hours)),
            RETRIES);
    ShiftCalendar calendar =
        new ShiftCalendar(profile.zone(), profile.shifts(), profile.windDown());
    return new RunSetup(profile, calendar, RunSettings.usual(), new PriorityPlanner(), STORE);
  }

  static Sample sample(Cap... caps) {
    return new Sample(
        "sst-07",
        "sandstone",
        Optional.empty(),
        new Placement(new Point(0.004, 0), 0, 0),
        List.of(),
        List.of(caps));
  }

  static Cap charge(double coulombs) {
    return new Cap.OnCharge(new Charge(coulombs), Optional.empty(), "");
  }

  /** A map of the usual size, with a pass through each filter. */
  static Wanted map(String id, String... filters) {
    List<String> passes = filters.length == 0 ? List.of("panchromatic") : List.of(filters);
    return new Wanted(
        id,
        new Acquisition.Raster(Mode.INTENSITY_MAP, 100, 90, LINE.dividedBy(100), passes, 1),
        Rectangle.of(new Point(0, 0), 1e-6, 9e-7));
  }

  /** A count at one point, of three exposures, which ends with enough coincidences. */
  static Wanted count(String id, long coincidences) {
    return new Wanted(
        id,
        new Acquisition.Spot(
            Mode.PHOTON_CORRELATION, EXPOSURE.multipliedBy(3), OptionalLong.of(coincidences)),
        new Points(List.of(new Point(2e-5, 0))));
  }

  /** A job that is being written down: each method gives another one, {@link #job()} ends it. */
  record Wanted(Job job) {
    Wanted(String id, Acquisition acquisition, Region region) {
      this(
          new Job(
              id,
              "sst-07",
              acquisition,
              region,
              BEAM,
              Job.USUAL_PRIORITY,
              List.of(),
              AtCap.REFUSE,
              Optional.empty(),
              Optional.empty()));
    }

    Wanted beam(BeamSettings beam) {
      return with(beam, job.priority(), job.after(), job.atCap());
    }

    Wanted priority(int priority) {
      return with(job.beam(), priority, job.after(), job.atCap());
    }

    Wanted after(String... ids) {
      return with(job.beam(), job.priority(), List.of(ids), job.atCap());
    }

    Wanted atCap(AtCap atCap) {
      return with(job.beam(), job.priority(), job.after(), atCap);
    }

    private Wanted with(BeamSettings beam, int priority, List<String> after, AtCap atCap) {
      return new Wanted(
          new Job(
              job.id(),
              job.sample(),
              job.acquisition(),
              job.region(),
              beam,
              priority,
              after,
              atCap,
              job.earliest(),
              job.deadline()));
    }

    Wanted notBefore(Instant earliest) {
      return within(Optional.of(earliest), job.deadline());
    }

    Wanted until(Instant deadline) {
      return within(job.earliest(), Optional.of(deadline));
    }

    private Wanted within(Optional<Instant> earliest, Optional<Instant> deadline) {
      return new Wanted(
          new Job(
              job.id(),
              job.sample(),
              job.acquisition(),
              job.region(),
              job.beam(),
              job.priority(),
              job.after(),
              job.atCap(),
              earliest,
              deadline));
    }
  }
}
