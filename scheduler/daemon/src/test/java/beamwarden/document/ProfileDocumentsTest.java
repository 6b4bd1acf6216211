package beamwarden.document;

import static org.junit.jupiter.api.Assertions.assertEquals;

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
import beamwarden.profile.Profile;
import beamwarden.quantity.Current;
import beamwarden.quantity.Length;
import beamwarden.quantity.Voltage;
import beamwarden.shift.ShiftRule.Closed;
import beamwarden.shift.ShiftRule.Hours;
import beamwarden.shift.ShiftRule.OnDate;
import beamwarden.shift.ShiftRule.Weekly;
import java.time.DayOfWeek;
import java.time.Duration;
import java.time.LocalDate;
import java.time.LocalTime;
import java.time.ZoneId;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import org.junit.jupiter.api.Test;

class ProfileDocumentsTest {
  private static final Profile PROFILE = Samples.NORTH_ROOM;
  private static final Abilities ABILITIES = PROFILE.abilities();

  @Test
  void readsAProfileThatUsesNearlyEverythingWithoutProblems() {
    assertEquals(
        List.of(), Samples.problems(ProfileDocuments.read("profile.yaml", Samples.PROFILE)));
  }

  @Test
  void readsHowTheLabUsesTheInstrument() {
    assertEquals("north-room", ABILITIES.instrument());
    assertEquals("simulated", PROFILE.adapter());
    assertEquals(Map.of("seed", "7", "noise", "off"), PROFILE.options());
    assertEquals(ZoneId.of("Europe/Ljubljana"), PROFILE.zone());
    assertEquals(Duration.ofMinutes(10), PROFILE.windDown());
    assertEquals(2, PROFILE.retries());
  }

  @Test
  void readsStageAndField() {
    assertEquals(
        new Stage(-0.025, 0.025, -0.02, 0.02, 1e-3, 1e-2, Duration.ofSeconds(2), 2e-6),
        ABILITIES.stage());
    assertEquals(new Field(0.5e-3, 0.02), ABILITIES.field());
  }

  @Test
  void readsTheColumnAndItsMeter() {
    assertEquals(
        new Column(
            new Voltage(1000),
            new Voltage(30_000),
            Duration.ofMinutes(12),
            new Current(2e-12),
            new Current(40e-9),
            Duration.ofMinutes(2)),
        ABILITIES.column());
    assertEquals(
        new CurrentMeter(
            0.03, new Current(0.2e-12), 0.1, Duration.ofHours(1), Duration.ofSeconds(40)),
        ABILITIES.meter());
    assertEquals(
        List.of(new Probe(new Voltage(8000), new Current(350e-12), new Length(6e-9))),
        ABILITIES.probes());
    assertEquals(
        new Blanker(Blanker.Kind.FAST, Optional.of(Duration.ofNanos(100_000))),
        ABILITIES.blanker());
  }

  @Test
  void readsFiltersAndTheTimeToChangeThem() {
    assertEquals(
        Map.of(
            "violet", new Filter(new Length(380e-9), new Length(450e-9)),
            "red", new Filter(new Length(600e-9), new Length(680e-9))),
        ABILITIES.filters());
    assertEquals(Duration.ofSeconds(4), ABILITIES.filterChange());
  }

  @Test
  void readsTheModesThatThisVersionRunsAndLeavesOutTheOthers() {
    assertEquals(
        Map.of(
            Mode.ELECTRON_IMAGE,
            new ModeAbility(
                Duration.ofNanos(100),
                Duration.ofNanos(100_000),
                OptionalDouble.empty(),
                Duration.ZERO,
                Duration.ZERO,
                Boundary.LINE),
            Mode.INTENSITY_MAP,
            new ModeAbility(
                Duration.ofNanos(200),
                Duration.ofMillis(10),
                OptionalDouble.of(300e-6),
                Duration.ofNanos(500_000),
                Duration.ofMillis(400),
                Boundary.LINE),
            Mode.PHOTON_CORRELATION,
            new ModeAbility(
                Duration.ofSeconds(1),
                Duration.ofSeconds(30),
                OptionalDouble.empty(),
                Duration.ZERO,
                Duration.ZERO,
                Boundary.SLICE)),
        ABILITIES.modes());
  }

  @Test
  void readsShiftsInTheOrderInWhichTheyAreWritten() {
    Hours night =
        new Hours(
            LocalTime.of(19, 0),
            LocalTime.of(7, 0),
            true,
            Optional.of(Duration.ofMinutes(15)),
            Optional.of(LocalTime.of(6, 0)),
            Optional.of(Duration.ofHours(10)));
    assertEquals(
        List.of(
            new Weekly(
                Set.of(
                    DayOfWeek.MONDAY,
                    DayOfWeek.TUESDAY,
                    DayOfWeek.WEDNESDAY,
                    DayOfWeek.THURSDAY,
                    DayOfWeek.FRIDAY),
                night),
            new Weekly(Set.of(DayOfWeek.SATURDAY, DayOfWeek.SUNDAY), attended(9, 17)),
            new OnDate(LocalDate.of(2031, 3, 9), attended(10, 12)),
            new Closed(LocalDate.of(2031, 3, 8), "service visit")),
        PROFILE.shifts());
  }

  private static Hours attended(int opens, int closes) {
    return new Hours(
        LocalTime.of(opens, 0),
        LocalTime.of(closes, 0),
        false,
        Optional.empty(),
        Optional.empty(),
        Optional.empty());
  }

  @Test
  void acceptsASlowBlankerThatSaysHowLongTheBeamFliesBack() {
    String slow =
        Samples.PROFILE
            .replace("kind: fast", "kind: slow")
            .replace("100 us], stops-at", "100 us], flyback: 1 ms, stops-at");
    assertEquals(List.of(), Samples.problems(ProfileDocuments.read("profile.yaml", slow)));
  }
}
