package beamwarden.simulated;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Conditions;
import beamwarden.beam.Mode;
import beamwarden.beam.Point;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.Column;
import beamwarden.instrument.CurrentMeter;
import beamwarden.instrument.Field;
import beamwarden.instrument.Filter;
import beamwarden.instrument.ModeAbility;
import beamwarden.instrument.Probe;
import beamwarden.instrument.Stage;
import beamwarden.quantity.Current;
import beamwarden.quantity.Length;
import beamwarden.quantity.Voltage;
import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;

/** An invented lab: what its instrument can do, and usual conditions. */
final class Lab {
  static final BeamSettings GENTLE = new BeamSettings(new Voltage(8e3), new Current(350e-12));
  static final Conditions VIOLET = new Conditions(GENTLE, Mode.INTENSITY_MAP, "violet");
  static final Conditions COUNTING =
      new Conditions(
          new BeamSettings(new Voltage(5e3), new Current(15e-12)),
          Mode.PHOTON_CORRELATION,
          Conditions.PANCHROMATIC);
  static final Point MIDDLE = new Point(0, 0);
  static final Duration FRAME_START = Duration.ofMillis(2500);
  static final Duration ALONE = Duration.ofNanos(100_000);
  static final Duration READING_TAKES = Duration.ofSeconds(20);

  private Lab() {}

  static Abilities abilities() {
    return abilities(Blanker.Kind.FAST);
  }

  static Abilities abilities(Blanker.Kind blanker) {
    return new Abilities(
        "north-room",
        new Stage(-25e-3, 25e-3, -25e-3, 25e-3, 1e-3, 10e-3, Duration.ofSeconds(2), 2e-6),
        new Field(0.5e-3, 0.02),
        new Column(
            new Voltage(1e3),
            new Voltage(30e3),
            Duration.ofMinutes(12),
            new Current(2e-12),
            new Current(40e-9),
            Duration.ofMinutes(2)),
        new CurrentMeter(0.03, new Current(0.2e-12), 0.1, Duration.ofHours(1), READING_TAKES),
        new Blanker(blanker, Optional.of(ALONE)),
        Map.of(
            "violet", new Filter(new Length(380e-9), new Length(450e-9)),
            "red", new Filter(new Length(600e-9), new Length(680e-9))),
        Duration.ofSeconds(4),
        Map.of(
            Mode.ELECTRON_IMAGE, raster("PT0.0000001S", "PT0.0001S"),
            Mode.INTENSITY_MAP, raster("PT0.0000002S", "PT0.01S"),
            Mode.PHOTON_CORRELATION,
                new ModeAbility(
                    Duration.ofSeconds(1),
                    Duration.ofSeconds(30),
                    OptionalDouble.empty(),
                    Duration.ZERO,
                    Duration.ZERO,
                    ModeAbility.Boundary.SLICE)),
        List.of(new Probe(GENTLE.voltage(), GENTLE.current(), new Length(6e-9))));
  }

  private static ModeAbility raster(String shortest, String longest) {
    return new ModeAbility(
        Duration.parse(shortest),
        Duration.parse(longest),
        OptionalDouble.of(300e-6),
        Duration.ofNanos(200_000),
        FRAME_START,
        ModeAbility.Boundary.LINE);
  }
}
