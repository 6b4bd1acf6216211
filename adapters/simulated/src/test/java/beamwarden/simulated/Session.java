package beamwarden.simulated;

import beamwarden.beam.Conditions;
import beamwarden.beam.Exposure;
import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.beam.Scan;
import beamwarden.beam.SpotScan;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Grant;
import beamwarden.instrument.Instrument;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.InstrumentListener;
import beamwarden.instrument.Receipt;
import beamwarden.quantity.Current;
import beamwarden.timing.VirtualTime;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Set;

/** A daemon's side, written by hand: it asks, hears, and moves the time. */
final class Session implements InstrumentListener {
  static final Instant EVENING = Instant.parse("2031-03-12T18:00:00Z");
  static final String STORE = "store-a";
  static final Placement PLACEMENT = new Placement(new Point(12.4e-3, -3.1e-3), 0, 3e-6);
  static final Duration LEASE = Duration.ofHours(2);

  final VirtualTime time = new VirtualTime(EVENING);
  final Abilities abilities;
  final MemoryRecord truth = DeliveredRecord.inMemory();
  final Hardware hardware;
  final Notes notes = Notes.inMemory();
  final List<InstrumentEvent> heard = new ArrayList<>();
  Instrument instrument;
  private long beats;
  private long requests;
  private long fence;
  private String session = "";

  Session(Simulation simulation) {
    this(Lab.abilities(), simulation);
  }

  Session(Abilities abilities, Simulation simulation) {
    this.abilities = abilities;
    this.hardware = Hardware.inMemory(abilities, simulation, time, truth);
    this.instrument = new SimulatedInstrument(hardware, notes);
  }

  /** A session without chance, connected and sealed. */
  static Session exact() {
    return new Session(Simulation.inMemory(1).withoutNoise()).ready();
  }

  /** The adapter's object is replaced, as when its process is started again. */
  Session restarted() {
    instrument = new SimulatedInstrument(hardware, notes);
    return this;
  }

  /** Connects and seals with the next fence, asking about nothing. */
  Session ready() {
    connect();
    seal(Set.of());
    beat();
    return this;
  }

  void connect() {
    instrument.connect(this);
    pass(Duration.ZERO);
    session = last(InstrumentEvent.Connected.class).session();
  }

  void seal(Set<Long> asked) {
    instrument.seal(++fence, STORE, asked, false);
    pass(Duration.ZERO);
  }

  long fence() {
    return fence;
  }

  /** Sends a heartbeat and returns its number. */
  long beat() {
    instrument.heartbeat(++beats);
    pass(Duration.ZERO);
    return beats;
  }

  /** Prepares and waits until it is done. */
  void prepare(Conditions conditions, Point stage) {
    instrument.prepare(++requests, conditions, stage);
    pass(Duration.ofMinutes(15));
    beat();
  }

  void prepareFor(Exposure exposure) {
    prepare(exposure.conditions(), exposure.stageTarget());
  }

  /** Prepares for a grant and begins it; the beam comes on after the frame start. */
  void expose(Grant grant) {
    prepareFor(grant.exposure());
    instrument.begin(fresh(grant));
    pass(Duration.ZERO);
  }

  /** The same grant, its latest start counted from a heartbeat that is sent now. */
  Grant fresh(Grant grant) {
    return with(grant, beat());
  }

  void pass(Duration length) {
    time.runUntil(time.instant().plus(length));
  }

  static RasterScan raster(int rows) {
    return new RasterScan(
        Rectangle.of(Lab.MIDDLE, 100e-6, 50e-6),
        1000,
        500,
        0,
        rows,
        Duration.ofNanos(25_000),
        Duration.ofNanos(200_000));
  }

  Grant map(long number, int rows) {
    return grant(number, Lab.VIOLET, raster(rows));
  }

  Grant spot(long number, Duration length) {
    return grant(number, Lab.COUNTING, new SpotScan(new Point(0, 8e-6), length));
  }

  /** A grant with room to spare. */
  Grant grant(long number, Conditions conditions, Scan scan) {
    return new Grant(
        number,
        STORE,
        fence,
        session,
        new Exposure("survey", 0, "sst-07", PLACEMENT, conditions, scan),
        scan.beamOn().plus(Lab.ALONE),
        highest(conditions),
        beats,
        Duration.ofMinutes(1),
        LEASE,
        "head");
  }

  static Current highest(Conditions conditions) {
    return Lab.abilities()
        .meter()
        .highest(conditions.beam().current(), conditions.beam().current());
  }

  static Grant with(Grant grant, long heartbeat) {
    return new Grant(
        grant.number(),
        grant.store(),
        grant.fence(),
        grant.session(),
        grant.exposure(),
        grant.longestBeamOn(),
        grant.highestCurrent(),
        heartbeat,
        grant.latestStart(),
        grant.lease(),
        grant.chainHead());
  }

  static Grant lasting(Grant grant, Duration longestBeamOn) {
    return new Grant(
        grant.number(),
        grant.store(),
        grant.fence(),
        grant.session(),
        grant.exposure(),
        longestBeamOn,
        grant.highestCurrent(),
        grant.heartbeat(),
        grant.latestStart(),
        grant.lease(),
        grant.chainHead());
  }

  @Override
  public void on(InstrumentEvent event) {
    heard.add(event);
  }

  /** The last event of a kind. */
  <E extends InstrumentEvent> E last(Class<E> kind) {
    List<E> all = all(kind);
    if (all.isEmpty()) {
      throw new AssertionError("no " + kind.getSimpleName() + " among " + heard);
    }
    return all.get(all.size() - 1);
  }

  <E extends InstrumentEvent> List<E> all(Class<E> kind) {
    return heard.stream().filter(kind::isInstance).map(kind::cast).toList();
  }

  Receipt receipt() {
    return last(InstrumentEvent.Ended.class).receipt();
  }

  double electrons() {
    return truth.stretches().stream().mapToDouble(Stretch::electrons).sum();
  }
}
