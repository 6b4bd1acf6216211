package beamwarden.system;

import beamwarden.beam.Mode;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.Column;
import beamwarden.instrument.CurrentMeter;
import beamwarden.instrument.Field;
import beamwarden.instrument.Filter;
import beamwarden.instrument.ModeAbility;
import beamwarden.instrument.ModeAbility.Boundary;
import beamwarden.instrument.Probe;
import beamwarden.instrument.Stage;
import beamwarden.plan.PriorityPlanner;
import beamwarden.profile.Profile;
import beamwarden.quantity.Current;
import beamwarden.quantity.Length;
import beamwarden.quantity.Voltage;
import beamwarden.run.RunSettings;
import beamwarden.run.RunSetup;
import beamwarden.shift.ShiftCalendar;
import beamwarden.shift.ShiftRule;
import java.time.DayOfWeek;
import java.time.Duration;
import java.time.Instant;
import java.time.LocalTime;
import java.time.ZoneId;
import java.util.EnumSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;

/** An invented lab for tests: one instrument with a night shift on every day of the week. */
final class Lab {
  /** A Wednesday, ten minutes before the night shift opens at 18:00 UTC. */
  static final Instant AFTERNOON = Instant.parse("2031-03-12T17:50:00Z");

  static final String STORE = "store-of-tests";

  private Lab() {}

  static Abilities abilities() {
    Stage stage = new Stage(-0.025, 0.025, -0.025, 0.025, 1e-3, 10e-3, seconds(2), 1e-6);
    Column column =
        new Column(
            new Voltage(1e3),
            new Voltage(30e3),
            Duration.ofMinutes(4),
            new Current(2e-12),
            new Current(40e-9),
            Duration.ofMinutes(1));
    CurrentMeter meter =
        new CurrentMeter(0.03, new Current(0.2e-12), 0.10, Duration.ofHours(1), seconds(20));
    Map<String, Filter> filters =
        Map.of(
            "violet", new Filter(new Length(380e-9), new Length(450e-9)),
            "green", new Filter(new Length(500e-9), new Length(560e-9)),
            "red", new Filter(new Length(600e-9), new Length(680e-9)));
    Map<Mode, ModeAbility> modes =
        Map.of(
            Mode.ELECTRON_IMAGE, mode(100, 100_000, 200_000, Boundary.LINE),
            Mode.INTENSITY_MAP, mode(200, 10_000_000, 200_000, Boundary.LINE),
            Mode.PHOTON_CORRELATION, mode(1_000_000_000L, 30_000_000_000L, 0, Boundary.SLICE));
    Probe probe = new Probe(new Voltage(8e3), new Current(350e-12), new Length(6e-9));
    return new Abilities(
        "north-room",
        stage,
        new Field(500e-6, 0.02),
        column,
        meter,
        new Blanker(Blanker.Kind.FAST, Optional.of(Duration.ofNanos(100_000))),
        filters,
        seconds(4),
        modes,
        List.of(probe));
  }

  private static ModeAbility mode(
      long shortestNanos, long longestNanos, long flybackNanos, Boundary boundary) {
    return new ModeAbility(
        Duration.ofNanos(shortestNanos),
        Duration.ofNanos(longestNanos),
        OptionalDouble.empty(),
        Duration.ofNanos(flybackNanos),
        Duration.ofMillis(500),
        boundary);
  }

  static Profile profile() {
    ShiftRule.Hours night =
        new ShiftRule.Hours(
            LocalTime.of(19, 0),
            LocalTime.of(7, 0),
            true,
            Optional.empty(),
            Optional.empty(),
            Optional.empty());
    Set<DayOfWeek> always = EnumSet.allOf(DayOfWeek.class);
    return new Profile(
        abilities(),
        "simulated",
        Map.of(),
        ZoneId.of("Europe/Ljubljana"),
        Duration.ofMinutes(10),
        List.of(new ShiftRule.Weekly(always, night)),
        3);
  }

  static RunSetup setup() {
    return setup(profile());
  }

  static RunSetup setup(Profile profile) {
    ShiftCalendar calendar =
        new ShiftCalendar(profile.zone(), profile.shifts(), profile.windDown());
    return new RunSetup(profile, calendar, RunSettings.usual(), new PriorityPlanner(), STORE);
  }

  private static Duration seconds(long seconds) {
    return Duration.ofSeconds(seconds);
  }
}
