package beamwarden.report;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Mode;
import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.Points;
import beamwarden.beam.Rectangle;
import beamwarden.dose.Deliveries;
import beamwarden.dose.Delivery;
import beamwarden.dose.Done;
import beamwarden.dose.Exposures;
import beamwarden.dose.Receiving;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.Column;
import beamwarden.instrument.CurrentMeter;
import beamwarden.instrument.CurrentReading;
import beamwarden.instrument.DataFile;
import beamwarden.instrument.Field;
import beamwarden.instrument.ModeAbility;
import beamwarden.instrument.Receipt;
import beamwarden.instrument.Stage;
import beamwarden.ledger.Entry;
import beamwarden.ledger.Recorded;
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
import beamwarden.shift.ShiftCalendar;
import beamwarden.shift.ShiftRule;
import java.time.DayOfWeek;
import java.time.Duration;
import java.time.Instant;
import java.time.LocalTime;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.EnumSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalLong;

/**
 * A small lab whose figures are easy to work out by hand, and entries written down by hand.
 *
 * <p>The instrument is exact. The map is a raster of 100 by 100 pixels on 1 um by 1 um: one nA for
 * 10 us on a pixel of 10 nm by 10 nm is 62415.09 electrons, 624.1509 e/nm2 and 10 fC; a line is 1
 * pC, the pass 100 pC.
 */
final class Lab {
  static final ZoneId ZONE = ZoneId.of("Europe/Ljubljana");

  /** A Wednesday; the night opens at 19:00 by the lab's clock, 18:00 UTC. */
  static final Instant OPENS = Instant.parse("2031-03-12T18:00:00Z");

  static final Instant CLOSES = Instant.parse("2031-03-13T06:00:00Z");
  static final double MAP_FLUENCE = 624.1509;

  private final List<Recorded> recorded = new ArrayList<>();
  private Instant now = OPENS.minusSeconds(600);

  static ShiftCalendar calendar() {
    ShiftRule.Hours night =
        new ShiftRule.Hours(
            LocalTime.of(19, 0),
            LocalTime.of(7, 0),
            true,
            Optional.empty(),
            Optional.empty(),
            Optional.empty());
    EnumSet<DayOfWeek> days = EnumSet.range(DayOfWeek.MONDAY, DayOfWeek.FRIDAY);
    return new ShiftCalendar(
        ZONE, List.of(new ShiftRule.Weekly(days, night)), Duration.ofMinutes(10));
  }

  static Abilities abilities() {
    ModeAbility raster =
        new ModeAbility(
            Duration.ofNanos(100),
            Duration.ofSeconds(60),
            OptionalDouble.empty(),
            Duration.ZERO,
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
    return new Abilities(
        "north-room",
        new Stage(-0.025, 0.025, -0.025, 0.025, 1e-3, 1e-2, Duration.ofSeconds(2), 0),
        new Field(5e-4, 0),
        new Column(
            new Voltage(1000),
            new Voltage(30_000),
            Duration.ofMinutes(12),
            new Current(2e-12),
            new Current(4e-8),
            Duration.ofMinutes(2)),
        new CurrentMeter(0, new Current(0), 0.1, Duration.ofHours(1), Duration.ofSeconds(20)),
        new Blanker(Blanker.Kind.FAST, Optional.of(Duration.ZERO)),
        Map.of(),
        Duration.ofSeconds(4),
        Map.of(Mode.INTENSITY_MAP, raster, Mode.PHOTON_CORRELATION, slices),
        List.of());
  }

  static Sample sample() {
    return new Sample(
        "sst-07",
        "quartz-cemented sandstone, polished thin section",
        Optional.of(new Material("SiO2", 2.65)),
        new Placement(new Point(0.0124, -0.0031), 0, 0),
        List.of(
            new Area(
                "isotope-grain", Rectangle.of(new Point(5e-5, 0), 1e-5, 1e-5), Area.Use.CAPPED)),
        List.of(
            new Cap.OnFluence(
                new Fluence(9000),
                new Averaging.OverLength(new Length(2e-7)),
                Optional.empty(),
                ""),
            new Cap.OnFluence(
                new Fluence(8),
                new Averaging.OverLength(new Length(2e-7)),
                Optional.of("isotope-grain"),
                "kept for ion-probe work"),
            new Cap.OnCharge(new Charge(40e-6), Optional.empty(), "")));
  }

  static Job map(String id, String... after) {
    return job(
        id,
        new Acquisition.Raster(
            Mode.INTENSITY_MAP, 100, 100, Duration.ofNanos(10_000), List.of("panchromatic"), 1),
        Rectangle.of(new Point(0, 0), 1e-6, 1e-6),
        after);
  }

  static Job count(String id, long coincidences) {
    return job(
        id,
        new Acquisition.Spot(
            Mode.PHOTON_CORRELATION, Duration.ofSeconds(30), OptionalLong.of(coincidences)),
        new Points(List.of(new Point(2e-5, 0), new Point(3e-5, 0))));
  }

  private static Job job(
      String id, Acquisition acquisition, beamwarden.beam.Region region, String... after) {
    return new Job(
        id,
        "sst-07",
        acquisition,
        region,
        new BeamSettings(new Voltage(10_000), new Current(1e-9)),
        Job.USUAL_PRIORITY,
        List.of(after),
        AtCap.REFUSE,
        Optional.empty(),
        Optional.empty());
  }

  /** Moves the clock of the books. */
  Lab at(Instant moment) {
    now = moment;
    return this;
  }

  Instant now() {
    return now;
  }

  Lab write(Entry entry) {
    recorded.add(new Recorded(recorded.size() + 1L, now, 1, entry, "hash" + recorded.size()));
    return this;
  }

  Lab submit(Job... jobs) {
    write(new Entry.QueueSubmitted(new Queue("night", List.of(sample()), List.of(jobs)), "hash"));
    return write(new Entry.SampleDeclared(sample(), ""));
  }

  Lab state(String job, JobState state, String because) {
    return write(new Entry.JobChanged(job, state, Optional.empty(), because));
  }

  Lab held(String job, HeldFor what, String because) {
    return write(new Entry.JobChanged(job, JobState.HELD, Optional.of(what), because));
  }

  Lab note(Entry.Noted.What what, String text) {
    return write(new Entry.Noted(what, text));
  }

  /** What the next exposure of a job gives when it is granted. */
  static Delivery planned(Job job, Done done, long grant) {
    return Deliveries.planned(
        Exposures.next(job, sample(), abilities(), done, Optional.empty()).orElseThrow(),
        abilities(),
        new Current(1e-9),
        grant,
        grant);
  }

  Lab open(Delivery inFull) {
    return write(new Entry.GrantOpened(inFull, inFull.upperBeamOn(), "session"));
  }

  /** Books some units of a grant, with the file of their data. */
  Lab book(Delivery inFull, long units, Map<String, Long> counts) {
    Duration beamOn =
        inFull.bestBeamOn().dividedBy(inFull.exposure().scan().units()).multipliedBy(units);
    CurrentReading read =
        new CurrentReading(inFull.exposure().conditions().beam(), new Current(1e-9));
    DataFile file =
        new DataFile(
            "data/" + inFull.exposure().job() + "/" + inFull.grant() + ".dat",
            "application/octet-stream",
            1024,
            "ab".repeat(32));
    Receipt receipt =
        new Receipt(
            inFull.grant(),
            1,
            units,
            units,
            beamOn,
            Optional.of(read),
            Optional.of(read),
            counts,
            List.of(file),
            Optional.empty());
    Receiving.Believed believed =
        (Receiving.Believed) Deliveries.received(inFull, receipt, abilities().meter());
    return write(new Entry.GrantBooked(believed.delivered(), receipt));
  }

  /** A whole map, done. */
  Lab done(Job job, long grant) {
    Delivery inFull = planned(job, Done.NOTHING, grant);
    state(job.id(), JobState.RUNNING, "");
    open(inFull);
    at(now.plusSeconds(30));
    book(inFull, inFull.exposure().scan().units(), Map.of());
    return state(job.id(), JobState.DONE, "");
  }

  List<Recorded> entries() {
    return List.copyOf(recorded);
  }
}
