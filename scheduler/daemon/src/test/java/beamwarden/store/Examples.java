package beamwarden.store;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Conditions;
import beamwarden.beam.Exposure;
import beamwarden.beam.Line;
import beamwarden.beam.Mode;
import beamwarden.beam.Mosaic;
import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.Points;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.beam.Region;
import beamwarden.beam.Scan;
import beamwarden.beam.SpotScan;
import beamwarden.dose.Delivery;
import beamwarden.dose.Tolerances;
import beamwarden.dose.Trim;
import beamwarden.instrument.CurrentReading;
import beamwarden.instrument.DataFile;
import beamwarden.instrument.Fault;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.Receipt;
import beamwarden.ledger.Entry;
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
import beamwarden.queue.HeldFor;
import beamwarden.queue.Job;
import beamwarden.queue.JobState;
import beamwarden.queue.Material;
import beamwarden.queue.Queue;
import beamwarden.queue.Sample;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalLong;

/** Entries that between them hold every kind of value that the books can hold. */
final class Examples {
  static final Instant AT = Instant.parse("2031-03-12T19:00:00.123456789Z");

  private static final BeamSettings BEAM =
      new BeamSettings(new Voltage(8000), new Current(350e-12));
  private static final Placement PLACEMENT = new Placement(new Point(0.0124, -0.0031), 12, 3e-6);
  private static final Rectangle FRAME = Rectangle.of(new Point(0.1e-4, -4e-5), 3e-4, 1e-4 / 3);

  private Examples() {}

  static Entry noted(String text) {
    return new Entry.Noted(Entry.Noted.What.SHIFT_OPENED, text);
  }

  static Entry voided(long grant, String sample) {
    return new Entry.GrantVoided(grant, sample, false, "the seal says that it never began");
  }

  /** At least one of each. */
  static List<Entry> all() {
    List<Entry> all = new ArrayList<>();
    all.add(new Entry.FenceRaised(1, "north-room"));
    all.add(new Entry.QueueSubmitted(queue(), "5d41".repeat(16)));
    all.add(new Entry.SampleDeclared(sample(), "the owner was asked"));
    for (JobState state : JobState.values()) {
      if (state != JobState.HELD) {
        all.add(
            new Entry.JobChanged(
                "survey", state, Optional.empty(), "said „so“ \u2014 µm, \u0000 and \"quotes\""));
      }
    }
    for (HeldFor what : HeldFor.values()) {
      all.add(new Entry.JobChanged("survey", JobState.HELD, Optional.of(what), "held"));
    }
    all.add(new Entry.JobTrimmed("survey", new Trim(400, 3), "the cap leaves 60 e/nm2"));
    all.add(new Entry.JobFaulted("survey"));
    all.add(new Entry.GrantOpened(delivery(raster()), Duration.ofMillis(57_601), "session-3"));
    all.add(new Entry.GrantBooked(delivery(raster()), receipt(Optional.empty())));
    all.add(voided(3, "sst-07"));
    all.add(new Entry.GrantPresumed(delivery(spot()), "no receipt came", Optional.empty()));
    for (FaultKind kind : FaultKind.values()) {
      all.add(
          new Entry.GrantPresumed(
              delivery(spot()),
              "the receipt contradicts the clock",
              Optional.of(receipt(Optional.of(new Fault(kind, "as the instrument said"))))));
    }
    all.add(new Entry.CurrentMeasured(new CurrentReading(BEAM, new Current(351.25e-12))));
    all.add(new Entry.SessionSeen("session-3", true));
    all.add(new Entry.Approved("placements", "looked at the holder"));
    for (Entry.Noted.What what : Entry.Noted.What.values()) {
      all.add(new Entry.Noted(what, "in one sentence"));
    }
    return List.copyOf(all);
  }

  private static Scan raster() {
    return new RasterScan(
        FRAME, 1500, 1500, 10, 40, Duration.ofNanos(25_000), Duration.ofNanos(300_000));
  }

  private static Scan spot() {
    return new SpotScan(new Point(0, 8e-6), Duration.ofSeconds(30));
  }

  private static Delivery delivery(Scan scan) {
    Conditions conditions = new Conditions(BEAM, Mode.INTENSITY_MAP, "violet");
    Exposure exposure = new Exposure("survey", 2, "sst-07", PLACEMENT, conditions, scan);
    Tolerances tolerances = new Tolerances(0.02, 2e-6, 3e-6, Duration.ofNanos(100_000), true, 6e-9);
    return new Delivery(
        17,
        4,
        exposure,
        scan.units(),
        scan.beamOn(),
        scan.beamOn().plusNanos(1),
        new Current(350e-12),
        new Current(0.1e-12 + 0.2e-12 + 400e-12),
        tolerances);
  }

  private static Receipt receipt(Optional<Fault> fault) {
    return new Receipt(
        17,
        1,
        39,
        40,
        Duration.ofMillis(1500),
        Optional.of(new CurrentReading(BEAM, new Current(349e-12))),
        Optional.of(new CurrentReading(BEAM, new Current(352e-12))),
        Map.of("violet", 1_234_567L, "electrons", 9L),
        List.of(new DataFile("night/17.dat", "application/octet-stream", 42, "ab".repeat(32))),
        fault);
  }

  private static Sample sample() {
    return new Sample(
        "sst-07",
        "quartz-cemented sandstone, polished thin section",
        Optional.of(new Material("SiO2", 2.65)),
        PLACEMENT,
        List.of(
            new Area("grain", FRAME, Area.Use.CAPPED),
            new Area("edge", FRAME, Area.Use.KEEP_OUT),
            new Area("spots", FRAME, Area.Use.SACRIFICIAL)),
        List.of(
            fluenceCap(new Averaging.OverGeneration(), Optional.empty()),
            fluenceCap(new Averaging.OverProbe(), Optional.of("grain")),
            fluenceCap(new Averaging.OverLength(new Length(200e-9)), Optional.of("grain")),
            new Cap.OnCharge(new Charge(2.5e-6), Optional.of("spots"), "kept for later")));
  }

  private static Cap fluenceCap(Averaging averaging, Optional<String> area) {
    return new Cap.OnFluence(new Fluence(9000), averaging, area, "");
  }

  private static Queue queue() {
    Region mosaic = new Mosaic(6, 4, 3e-4, 3e-4, 0.06, new Point(4e-4, 0), 5);
    Region line = new Line(new Point(0, 0), new Point(1e-5, 0));
    Region points = new Points(List.of(new Point(-6e-6, 8e-6), new Point(6e-6, 8e-6)));
    List<Job> jobs =
        List.of(
            job(Mode.ELECTRON_IMAGE, FRAME, AtCap.REFUSE),
            job(Mode.INTENSITY_MAP, mosaic, AtCap.TRIM),
            job(Mode.SPECTRAL_MAP, line, AtCap.ASK),
            job(Mode.ANGULAR_PATTERN, points, AtCap.REFUSE),
            job(Mode.PHOTON_CORRELATION, points, AtCap.REFUSE),
            job(Mode.DECAY_TRACE, FRAME, AtCap.REFUSE));
    Sample bare = new Sample("bare", "", Optional.empty(), PLACEMENT, List.of(), List.of());
    return new Queue("thin-section-night", List.of(sample(), bare), jobs);
  }

  private static Acquisition acquisition(Mode mode) {
    return switch (mode) {
      case ELECTRON_IMAGE, INTENSITY_MAP, SPECTRAL_MAP, DECAY_TRACE ->
          new Acquisition.Raster(
              mode, 1500, 1200, Duration.ofNanos(25_000), List.of("violet", "green"), 2);
      case ANGULAR_PATTERN ->
          new Acquisition.Spot(mode, Duration.ofSeconds(10), OptionalLong.empty());
      case PHOTON_CORRELATION ->
          new Acquisition.Spot(mode, Duration.ofHours(3), OptionalLong.of(20_000));
    };
  }

  private static Job job(Mode mode, Region region, AtCap atCap) {
    return new Job(
        mode.text(),
        "sst-07",
        acquisition(mode),
        region,
        BEAM,
        Job.USUAL_PRIORITY,
        List.of("survey"),
        atCap,
        mode == Mode.ELECTRON_IMAGE ? Optional.of(AT) : Optional.empty(),
        mode == Mode.DECAY_TRACE ? Optional.of(AT.plusSeconds(86_400)) : Optional.empty());
  }
}
