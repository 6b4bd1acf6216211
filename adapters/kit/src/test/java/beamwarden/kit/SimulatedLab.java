package beamwarden.kit;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Mode;
import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.Column;
import beamwarden.instrument.CurrentMeter;
import beamwarden.instrument.Field;
import beamwarden.instrument.ModeAbility;
import beamwarden.instrument.ModeAbility.Boundary;
import beamwarden.instrument.Stage;
import beamwarden.quantity.Current;
import beamwarden.quantity.Voltage;
import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;

/** An invented instrument that settles fast, so that the suite has not long to wait. */
final class SimulatedLab {
  static final BeamSettings SETTINGS = new BeamSettings(new Voltage(8000), new Current(350e-12));
  static final Placement PLACEMENT = new Placement(new Point(0.2e-3, -0.1e-3), 12, 3e-6);

  private static final Duration FLYBACK = Duration.ofNanos(200_000);

  private SimulatedLab() {}

  static Abilities abilities(Blanker.Kind blanker) {
    return new Abilities(
        "south-room",
        new Stage(-25e-3, 25e-3, -25e-3, 25e-3, 1e-3, 10e-3, Duration.ofMillis(200), 2e-6),
        new Field(0.5e-3, 0.02),
        new Column(
            new Voltage(1000),
            new Voltage(30000),
            Duration.ofSeconds(1),
            new Current(2e-12),
            new Current(40e-9),
            Duration.ofSeconds(1)),
        new CurrentMeter(
            0.03, new Current(0.2e-12), 0.1, Duration.ofHours(1), Duration.ofMillis(500)),
        new Blanker(blanker, Optional.of(Duration.ofNanos(100_000))),
        Map.of(),
        Duration.ZERO,
        Map.of(
            Mode.INTENSITY_MAP, mode(Duration.ofMillis(100), Boundary.LINE),
            Mode.PHOTON_CORRELATION, mode(Duration.ZERO, Boundary.SLICE)),
        List.of());
  }

  /** Reads the record of exposures whose lines are cut to a beat. */
  static DeliveredStretches stretches(Duration beat) {
    return new DeliveredStretches(beat.multipliedBy(Exposures.LINE_BEATS).plus(FLYBACK));
  }

  private static ModeAbility mode(Duration frameStart, Boundary stopsAt) {
    return new ModeAbility(
        Duration.ofNanos(200),
        Duration.ofMinutes(10),
        OptionalDouble.of(300e-6),
        FLYBACK,
        frameStart,
        stopsAt);
  }
}
