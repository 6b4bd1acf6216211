package beamwarden.kit;

import beamwarden.beam.Conditions;
import beamwarden.beam.Point;
import beamwarden.beam.RasterScan;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.CurrentReading;
import beamwarden.instrument.DataFile;
import beamwarden.instrument.Fault;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.Grant;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.Instrument;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.InstrumentListener;
import beamwarden.instrument.Readings;
import beamwarden.instrument.Receipt;
import beamwarden.instrument.SealReport;
import beamwarden.instrument.StopWhen;
import beamwarden.quantity.Current;
import beamwarden.timing.Timeline;
import java.time.Duration;
import java.util.ArrayDeque;
import java.util.Deque;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.function.Function;

/**
 * The smallest honest adapter: in memory, on virtual time, without flyback or settling. What a bad
 * one does differently, it overrides.
 */
class PlainInstrument implements Instrument {
  private static final Duration GLANCE = Duration.ofMillis(5);

  final Timeline time;
  final PlainHardware hardware;
  final PlainNotes notes;
  final Deque<Grant> waiting = new ArrayDeque<>();
  Optional<Grant> running = Optional.empty();
  private final Abilities abilities;
  private final Function<Grant, DataFile> data;
  private final Map<Long, Long> heartbeatNanos = new HashMap<>();
  private long lastHeartbeatNanos;
  private int exposure;
  private boolean sealed;
  private boolean dead;
  private InstrumentListener listener = event -> {};

  PlainInstrument(PlainRig rig) {
    this.time = rig.line();
    this.hardware = rig.hardware();
    this.notes = rig.notes();
    this.abilities = rig.abilities();
    this.data = rig::write;
  }

  @Override
  public void connect(InstrumentListener to) {
    listener = to;
    sealed = false;
    heartbeatNanos.clear();
    tell(new InstrumentEvent.Connected(abilities, session(), readings()));
  }

  String session() {
    return hardware.session();
  }

  void cut() {
    tell(new InstrumentEvent.Lost("the line was cut"));
    listener = event -> {};
  }

  /** What is left of a process that was killed: nothing, and the scan's own timer blanks. */
  void die() {
    dead = true;
    hardware.blank();
  }

  @Override
  public void seal(long fence, String store, Set<Long> grants, boolean handOver) {
    if (!maySeal(fence, store, handOver)) {
      tell(new InstrumentEvent.SealRefused(notes.fence, notes.store));
      return;
    }
    notes.fence = fence;
    notes.store = store;
    sealed = true;
    endForSeal();
    forbidWaiting();
    Map<Long, GrantFate> fates = new HashMap<>();
    grants.forEach(grant -> fates.put(grant, fate(key(grant))));
    tell(new InstrumentEvent.Sealed(new SealReport(fence, store, 0, fates)));
  }

  String key(long grant) {
    return PlainNotes.key(notes.store, grant);
  }

  boolean maySeal(long fence, String store, boolean handOver) {
    boolean foreign = !notes.store.isEmpty() && !notes.store.equals(store);
    return fence > notes.fence && (!foreign || handOver);
  }

  void endForSeal() {
    end(Optional.empty());
  }

  GrantFate fate(String key) {
    if (notes.receipts.containsKey(key)) {
      return new GrantFate.Reported(notes.receipts.get(key));
    }
    return notes.begun.contains(key) ? unknown() : new GrantFate.NeverBegun();
  }

  GrantFate unknown() {
    return new GrantFate.Unknown();
  }

  void forbidWaiting() {
    while (!waiting.isEmpty()) {
      refuse(waiting.poll(), FaultKind.NOT_OFFERED);
    }
  }

  @Override
  public void prepare(long request, Conditions conditions, Point stage) {
    if (!reaches(conditions)) {
      Fault fault = new Fault(FaultKind.NOT_OFFERED, "the column does not reach that voltage");
      tell(new InstrumentEvent.NotPrepared(request, fault));
      return;
    }
    hardware.set(conditions, stage);
    tell(
        new InstrumentEvent.Prepared(
            request, hardware.conditions().orElseThrow(), hardware.stage()));
  }

  boolean reaches(Conditions conditions) {
    double volts = conditions.beam().voltage().volts();
    return volts <= abilities.column().highestVoltage().volts();
  }

  @Override
  public void measure(long request) {
    tell(new InstrumentEvent.Measured(request, reading(hardware.current())));
  }

  @Override
  public void begin(Grant grant) {
    if (knows(grant)) {
      return;
    }
    waiting.add(grant);
    later(Duration.ZERO, this::startNext);
  }

  boolean knows(Grant grant) {
    return waiting.contains(grant)
        || notes.begun.contains(PlainNotes.key(grant.store(), grant.number()));
  }

  void startNext() {
    if (running.isPresent() || waiting.isEmpty()) {
      return;
    }
    Grant grant = waiting.poll();
    Optional<FaultKind> forbidden = forbidden(grant);
    if (forbidden.isPresent()) {
      refuse(grant, forbidden.get());
      startNext();
      return;
    }
    start(grant);
  }

  private Optional<FaultKind> forbidden(Grant grant) {
    boolean entitled =
        sealed()
            && ofFence(grant)
            && ofStore(grant)
            && ofSession(grant)
            && hardware.conditions().equals(Optional.of(grant.exposure().conditions()));
    if (!entitled) {
      return Optional.of(FaultKind.NOT_OFFERED);
    }
    return inTime(grant) ? Optional.empty() : Optional.of(FaultKind.STARTED_TOO_LATE);
  }

  boolean sealed() {
    return sealed;
  }

  boolean ofFence(Grant grant) {
    return grant.fence() >= notes.fence;
  }

  boolean ofStore(Grant grant) {
    return grant.store().equals(notes.store);
  }

  boolean ofSession(Grant grant) {
    return grant.session().equals(session());
  }

  boolean inTime(Grant grant) {
    Long seen = heartbeatNanos.get(grant.heartbeat());
    return seen != null && time.elapsedNanos() - seen <= grant.latestStart().toNanos();
  }

  void refuse(Grant grant, FaultKind kind) {
    Fault fault = new Fault(kind, "the grant may not begin");
    tell(new InstrumentEvent.NotBegun(grant.number(), fault));
  }

  void start(Grant grant) {
    int mine = ++exposure;
    running = Optional.of(grant);
    noteBegun(grant);
    tell(new InstrumentEvent.Begun(grant.number()));
    hardware.unblank(grant);
    later(mostBeamOn(grant), () -> endIfStill(mine, Optional.empty()));
    watch(mine);
  }

  void noteBegun(Grant grant) {
    notes.begun.add(PlainNotes.key(grant.store(), grant.number()));
  }

  Duration mostBeamOn(Grant grant) {
    Duration scan = grant.exposure().scan().duration();
    return grant.longestBeamOn().compareTo(scan) < 0 ? grant.longestBeamOn() : scan;
  }

  private void watch(int mine) {
    if (exposure != mine || running.isEmpty()) {
      return;
    }
    Grant grant = running.get();
    if (tooHigh(grant)) {
      end(Optional.of(new Fault(FaultKind.CURRENT_OUT_OF_BOUNDS, "too much current")));
    } else if (leaseEnded(grant)) {
      end(Optional.of(new Fault(FaultKind.LEASE_ENDED, "no heartbeat came")));
    } else {
      later(GLANCE, () -> watch(mine));
    }
  }

  boolean tooHigh(Grant grant) {
    return hardware.current().compareTo(grant.highestCurrent()) > 0;
  }

  boolean leaseEnded(Grant grant) {
    return time.elapsedNanos() - lastHeartbeatNanos >= grant.lease().toNanos();
  }

  private void endIfStill(int mine, Optional<Fault> fault) {
    if (exposure == mine) {
      end(fault);
    }
  }

  void end(Optional<Fault> fault) {
    if (running.isEmpty()) {
      return;
    }
    Grant grant = running.get();
    running = Optional.empty();
    Receipt receipt = receipt(grant, hardware.blank(), fault);
    keep(grant, receipt);
    tell(new InstrumentEvent.Ended(receipt));
    later(Duration.ZERO, this::startNext);
  }

  void keep(Grant grant, Receipt receipt) {
    notes.receipts.put(PlainNotes.key(grant.store(), grant.number()), receipt);
  }

  Receipt receipt(Grant grant, Duration beamOn, Optional<Fault> fault) {
    long touched = PlainHardware.unitsTouched(grant.exposure().scan(), beamOn);
    boolean whole =
        !(grant.exposure().scan() instanceof RasterScan raster)
            || beamOn.toNanos() % raster.lineBeamOn().toNanos() == 0;
    Optional<CurrentReading> reading = Optional.of(reading(hardware.current()));
    return new Receipt(
        grant.number(),
        grant.fence(),
        whole ? touched : touched - 1,
        touched,
        beamOn,
        reading,
        reading,
        Map.of(),
        List.of(write(grant)),
        fault);
  }

  DataFile write(Grant grant) {
    return data.apply(grant);
  }

  @Override
  public void stop(StopWhen when) {
    forbidWaiting();
    if (running.isEmpty()) {
      return;
    }
    int mine = exposure;
    later(toTheEnd(when), () -> endIfStill(mine, Optional.empty()));
  }

  Duration toTheEnd(StopWhen when) {
    if (when == StopWhen.NOW) {
      return Duration.ZERO;
    }
    if (!(running.orElseThrow().exposure().scan() instanceof RasterScan raster)) {
      return running.orElseThrow().exposure().scan().duration();
    }
    long line = raster.lineBeamOn().toNanos();
    return Duration.ofNanos(line - hardware.sinceUnblanked().toNanos() % line);
  }

  @Override
  public void heartbeat(long number) {
    lastHeartbeatNanos = time.elapsedNanos();
    heartbeatNanos.put(number, lastHeartbeatNanos);
    tell(new InstrumentEvent.HeartbeatSeen(number));
  }

  @Override
  public void acknowledge(long grant) {
    notes.receipts.remove(PlainNotes.key(notes.store, grant));
  }

  @Override
  public void windDown() {
    forbidWaiting();
    endForWindDown();
    closeValve();
    tell(new InstrumentEvent.WoundDown(readings()));
  }

  void endForWindDown() {
    end(Optional.empty());
  }

  void closeValve() {
    hardware.closeValve();
  }

  @Override
  public void close() {
    waiting.clear();
    endForClose();
    dead = true;
  }

  void endForClose() {
    end(Optional.empty());
  }

  void later(Duration delay, Runnable task) {
    time.after(
        delay,
        () -> {
          if (!dead) {
            task.run();
          }
        });
  }

  void tell(InstrumentEvent event) {
    listener.on(event);
  }

  Readings readings() {
    return new Readings(
        !hardware.beamOn(), hardware.valveClosed(), true, hardware.conditions(), hardware.stage());
  }

  private CurrentReading reading(Current current) {
    return new CurrentReading(hardware.conditions().orElseThrow().beam(), current);
  }
}
