package beamwarden.dose;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Conditions;
import beamwarden.beam.Exposure;
import beamwarden.beam.Mode;
import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.Points;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.beam.Region;
import beamwarden.beam.Scan;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.Column;
import beamwarden.instrument.CurrentMeter;
import beamwarden.instrument.Field;
import beamwarden.instrument.ModeAbility;
import beamwarden.instrument.Probe;
import beamwarden.instrument.Stage;
import beamwarden.quantity.Charge;
import beamwarden.quantity.Current;
import beamwarden.quantity.Fluence;
import beamwarden.quantity.Length;
import beamwarden.quantity.Voltage;
import beamwarden.queue.Acquisition;
import beamwarden.queue.Area;
import beamwarden.queue.AtCap;
import beamwarden.queue.Averaging;
import beamwarden.queue.Cap;
import beamwarden.queue.Job;
import beamwarden.queue.Material;
import beamwarden.queue.Sample;
import java.time.Duration;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalLong;

/** An instrument, samples and jobs for tests of dose. Lengths are micrometres. */
final class Fixtures {
  static final double UM = 1e-6;
  static final Placement PLACED = new Placement(new Point(0.0124, -0.0031), 0, 0);
  static final Current ONE_NANOAMPERE = new Current(1e-9);

  private Fixtures() {}

  /** An instrument that is exact in everything, with a probe of 10 nm at every setting. */
  static Abilities exact() {
    return instrument(0, 0, 0, Blanker.Kind.FAST, Duration.ZERO);
  }

  /** The instrument of the profile example: 2 %, 2 um, 10 % drift and 3 % meter. */
  static Abilities usual() {
    return instrument(0.02, 2 * UM, 0.1, Blanker.Kind.FAST, Duration.ofNanos(100_000));
  }

  static Abilities instrument(
      double calibration,
      double repeatability,
      double drift,
      Blanker.Kind blanker,
      Duration blanking) {
    ModeAbility raster =
        new ModeAbility(
            Duration.ofNanos(100),
            Duration.ofSeconds(60),
            OptionalDouble.empty(),
            Duration.ofNanos(200_000),
            Duration.ZERO,
            ModeAbility.Boundary.LINE);
    ModeAbility slices =
        new ModeAbility(
            Duration.ofSeconds(1),
            Duration.ofSeconds(30),
            OptionalDouble.empty(),
            Duration.ZERO,
            Duration.ZERO,
            ModeAbility.Boundary.SLICE);
    boolean metered = drift > 0;
    return new Abilities(
        "north-room",
        new Stage(-0.025, 0.025, -0.025, 0.025, 1e-3, 1e-2, Duration.ofSeconds(2), repeatability),
        new Field(5e-4, calibration),
        new Column(
            new Voltage(1000),
            new Voltage(30_000),
            Duration.ofMinutes(12),
            new Current(2e-12),
            new Current(4e-8),
            Duration.ofMinutes(2)),
        new CurrentMeter(
            metered ? 0.03 : 0,
            new Current(metered ? 2e-13 : 0),
            drift,
            Duration.ofHours(1),
            Duration.ofSeconds(20)),
        new Blanker(blanker, Optional.of(blanking)),
        Map.of(),
        Duration.ofSeconds(4),
        Map.of(
            Mode.INTENSITY_MAP, raster,
            Mode.ELECTRON_IMAGE, raster,
            Mode.PHOTON_CORRELATION, slices),
        List.of(new Probe(new Voltage(10_000), ONE_NANOAMPERE, new Length(10e-9))));
  }

  static Abilities withProbe(Abilities abilities, double widthNanometres) {
    return withProbes(
        abilities,
        List.of(
            new Probe(new Voltage(10_000), ONE_NANOAMPERE, new Length(widthNanometres * 1e-9))));
  }

  static Abilities withProbes(Abilities abilities, List<Probe> probes) {
    return new Abilities(
        abilities.instrument(),
        abilities.stage(),
        abilities.field(),
        abilities.column(),
        abilities.meter(),
        abilities.blanker(),
        abilities.filters(),
        abilities.filterChange(),
        abilities.modes(),
        probes);
  }

  static Rectangle square(double x, double y, double width, double height) {
    return Rectangle.of(new Point(x * UM, y * UM), width * UM, height * UM);
  }

  static Point point(double x, double y) {
    return new Point(x * UM, y * UM);
  }

  static Job map(
      Region region, int columns, int rows, Duration dwell, int frames, String... filters) {
    return job(
        new Acquisition.Raster(
            Mode.INTENSITY_MAP, columns, rows, dwell, Arrays.asList(filters), frames),
        region,
        1e-9);
  }

  static Job count(Duration longest, Point... places) {
    return job(
        new Acquisition.Spot(Mode.PHOTON_CORRELATION, longest, OptionalLong.empty()),
        new Points(Arrays.asList(places)),
        1e-9);
  }

  static Job job(Acquisition acquisition, Region region, double amperes) {
    return new Job(
        "survey",
        "sst-07",
        acquisition,
        region,
        new BeamSettings(new Voltage(10_000), new Current(amperes)),
        Job.USUAL_PRIORITY,
        List.of(),
        AtCap.REFUSE,
        Optional.empty(),
        Optional.empty());
  }

  static Sample quartz(Placement placement, List<Area> areas, Cap... caps) {
    return new Sample(
        "sst-07",
        "sandstone",
        Optional.of(new Material("SiO2", 2.65)),
        placement,
        areas,
        Arrays.asList(caps));
  }

  static Sample quartz(Cap... caps) {
    return quartz(PLACED, List.of(), caps);
  }

  static Cap.OnFluence overGeneration(double limit) {
    return fluence(limit, new Averaging.OverGeneration());
  }

  static Cap.OnFluence fluence(double limit, Averaging averaging) {
    return new Cap.OnFluence(new Fluence(limit), averaging, Optional.empty(), "");
  }

  static Cap.OnFluence fluenceIn(String area, double limit) {
    return new Cap.OnFluence(
        new Fluence(limit), new Averaging.OverGeneration(), Optional.of(area), "");
  }

  static Cap.OnCharge charge(double coulombs) {
    return new Cap.OnCharge(new Charge(coulombs), Optional.empty(), "");
  }

  static Exposure exposure(int pass, Scan scan) {
    return new Exposure(
        "survey",
        pass,
        "sst-07",
        PLACED,
        new Conditions(
            new BeamSettings(new Voltage(10_000), ONE_NANOAMPERE), Mode.INTENSITY_MAP, "green"),
        scan);
  }

  static RasterScan lines(Rectangle frame, int columns, int rows, int first, int count) {
    return new RasterScan(
        frame, columns, rows, first, count, Duration.ofNanos(40_000), Duration.ofNanos(200_000));
  }
}
