package beamwarden.simulated;

import beamwarden.beam.Conditions;
import beamwarden.beam.Point;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.Fault;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.Readings;
import beamwarden.quantity.Current;
import beamwarden.timing.Timeline;
import java.time.Duration;
import java.time.Instant;
import java.util.Optional;
import java.util.function.Consumer;

/**
 * The metal: column, stage, chamber and a scan engine with a timer of its own.
 *
 * <p>It outlives the adapter that drives it: a scan goes on to its end, or until its time is used
 * up, when the adapter's process is gone. What the beam truly does goes into the {@link
 * DeliveredRecord}. Its own lock guards it and the adapter on top of it.
 */
public final class Hardware {
  private static final Duration DOOR_STAYS_OPEN = Duration.ofMinutes(10);
  private static final Duration PUT_RIGHT_AFTER = Duration.ofHours(1);

  private final Abilities abilities;
  private final Simulation simulation;
  private final Imperfection imperfection;
  private final Timeline time;
  private final DeliveredRecord record;
  private final Consumer<HardwareState> memory;
  private final HardwareState state;
  private Watcher watcher = Watcher.NOBODY;
  private Timeline.Waiting scanEnd = () -> {};
  private boolean abandoned;

  Hardware(
      Abilities abilities,
      Simulation simulation,
      Timeline time,
      DeliveredRecord record,
      Optional<HardwareState> remembered,
      Consumer<HardwareState> memory) {
    if (abilities.blanker().kind() == Blanker.Kind.NONE) {
      throw new IllegalArgumentException(
          "the simulated instrument needs a blanker: a profile with none would leave the beam on a"
              + " sample between exposures; write kind: fast or kind: slow");
    }
    this.abilities = abilities;
    this.simulation = simulation;
    this.imperfection = new Imperfection(abilities, simulation);
    this.time = time;
    this.record = record;
    this.memory = memory;
    this.state = remembered.orElseGet(() -> new HardwareState(time.instant()));
    if (state.run.filter(run -> record.holds(run.grant(), run.fence())).isPresent()) {
      state.run = Optional.empty();
    }
    save();
  }

  /** An instrument in memory, switched on now. */
  public static Hardware inMemory(
      Abilities abilities, Simulation simulation, Timeline time, DeliveredRecord record) {
    return new Hardware(abilities, simulation, time, record, Optional.empty(), state -> {});
  }

  /** Somebody opens the door: the interlock takes the beam, and a new chamber session begins. */
  public synchronized void openDoor() {
    Optional<Outcome> cut = cutNow();
    state.session++;
    state.doorOpenUntil = time.instant().plus(DOOR_STAYS_OPEN);
    state.conditions = Optional.empty();
    save();
    watcher.beamLost(new Fault(FaultKind.INTERLOCK, "the chamber's door was opened"), cut);
  }

  /** The high voltage trips; a person sets it right an hour later. */
  public synchronized void tripHighVoltage() {
    Optional<Outcome> cut = cutNow();
    state.trippedUntil = time.instant().plus(PUT_RIGHT_AFTER);
    save();
    watcher.beamLost(new Fault(FaultKind.HIGH_VOLTAGE_TRIP, "the high voltage tripped"), cut);
  }

  /** From now on the current is so many times higher; a person sets it right an hour later. */
  public synchronized void surge(double factor) {
    state.surgeFrom = time.instant();
    state.surgeUntil = state.surgeFrom.plus(PUT_RIGHT_AFTER);
    state.surgeFactor = factor;
    save();
    watcher.surged();
  }

  /** The current that truly flows, or would if the beam were on; empty before it is ever set. */
  public synchronized Optional<Current> trueCurrent() {
    return current().map(truth -> new Current(truth.amperes(seconds(time.instant()))));
  }

  /** The chamber session's id. */
  public synchronized String session() {
    return abilities.instrument() + "/" + state.opened + "/" + state.session;
  }

  /** Its condition, as read back. */
  public synchronized Readings readings() {
    return new Readings(
        !beamIsOn(), state.valveClosed, highVoltageIsOn(), state.conditions, stageTruly());
  }

  Abilities abilities() {
    return abilities;
  }

  Simulation simulation() {
    return simulation;
  }

  Timeline time() {
    return time;
  }

  /** Whoever drives it from now on; a scan that an earlier adapter left running is blanked. */
  void drivenBy(Watcher next) {
    watcher.replaced();
    watcher = next;
    cutNow();
  }

  void drivenByNobody(Watcher last) {
    if (watcher == last) {
      watcher = Watcher.NOBODY;
    }
  }

  /** Leaves everything to the successor that reads the memory of this one. */
  void abandon() {
    abandoned = true;
    watcher = Watcher.NOBODY;
    scanEnd.cancel();
  }

  Duration sinceOpened() {
    return Duration.between(state.opened, time.instant());
  }

  long exposed() {
    return state.exposed;
  }

  /** Counts a grant that is about to be exposed. */
  void countExposure() {
    state.exposed++;
    save();
  }

  /** Why there can be no beam now, if so. */
  Optional<Fault> unfit() {
    if (time.instant().isBefore(state.doorOpenUntil)) {
      return Optional.of(new Fault(FaultKind.INTERLOCK, "the chamber's door is open"));
    }
    return highVoltageIsOn()
        ? Optional.empty()
        : Optional.of(
            new Fault(FaultKind.HIGH_VOLTAGE_TRIP, "the high voltage is off after a trip"));
  }

  Duration preparation(Conditions conditions, Point stage) {
    return abilities.preparation(state.conditions, state.stage, conditions, stage);
  }

  /** Brings it to conditions and a place; the time this takes has passed. */
  void prepare(Conditions conditions, Point stage) {
    if (!state.conditions.map(Conditions::beam).equals(Optional.of(conditions.beam()))) {
      state.settings++;
    }
    if (!state.stage.equals(stage)) {
      state.moves++;
    }
    state.conditions = Optional.of(conditions);
    state.stage = stage;
    state.valveClosed = false;
    save();
  }

  void closeValve() {
    state.valveClosed = true;
    save();
  }

  /** What the cup's meter shows, when the column is set. */
  Optional<Current> measured() {
    return trueCurrent().map(truth -> imperfection.reading(truth.amperes(), time.elapsedNanos()));
  }

  /** What the monitor would show at the most in an exposure, at a moment. */
  Current monitored(long grant, Instant at) {
    double truth = current().map(flowing -> flowing.amperes(seconds(at))).orElse(0.0);
    return new Current(truth * (1 + imperfection.monitorError(grant)));
  }

  /** The path of the running scan. */
  Optional<BeamPath> path() {
    return state.run.map(this::path);
  }

  /** Starts the scan engine. */
  void scan(Run run) {
    state.run = Optional.of(run);
    save();
    Duration untilReady =
        Duration.between(time.instant(), run.firstElectron().plusNanos(path(run).readyNanos()));
    scanEnd = time.after(untilReady, this::scanOver);
  }

  /**
   * The beam went off at a moment, not after now: what was done of a scan that ran. The engine
   * keeps its own time, so that a task that runs late blanks when it was due.
   */
  Optional<Outcome> cutAt(Instant off) {
    return state.run.map(run -> finish(run, Duration.between(run.firstElectron(), off).toNanos()));
  }

  /** How long the blanker takes this time, once it is told. */
  Duration blankingTakes(long grant) {
    return imperfection.blankingTakes(grant);
  }

  private Optional<Outcome> cutNow() {
    return cutAt(time.instant());
  }

  private synchronized void scanOver() {
    if (!abandoned && state.run.isPresent()) {
      Run run = state.run.get();
      watcher.scanOver(finish(run, path(run).endNanos()));
    }
  }

  /** The beam goes off: the truth is written before anything else happens. */
  private Outcome finish(Run run, long offNanos) {
    scanEnd.cancel();
    BeamPath path = path(run);
    long off = Math.max(0, Math.min(offNanos, path.endNanos()));
    Account account =
        new Account(
            path,
            current().orElseThrow(),
            seconds(run.firstElectron()),
            Duration.between(run.firstElectron(), state.surgeFrom).toNanos(),
            off);
    if (path.at(off).beamOnNanos() > 0) {
      record.append(account.stretches(truly(run, path)));
    }
    state.run = Optional.empty();
    save();
    return account.outcome(imperfection.monitorError(run.grant()));
  }

  private TrueScan truly(Run run, BeamPath path) {
    return new TrueScan(
        run,
        path,
        imperfection.stageError(state.moves),
        imperfection.gain("x"),
        imperfection.gain("y"),
        imperfection.probeMetres(state.conditions.orElseThrow().beam()));
  }

  private Optional<TrueCurrent> current() {
    boolean surging = time.instant().isBefore(state.surgeUntil);
    TrueCurrent.Surge surge =
        surging
            ? new TrueCurrent.Surge(seconds(state.surgeFrom), state.surgeFactor)
            : TrueCurrent.Surge.NONE;
    return state.conditions.map(
        known -> imperfection.current(known.beam().current(), state.settings, surge));
  }

  private BeamPath path(Run run) {
    return run.path(abilities.blanker().kind() == Blanker.Kind.FAST);
  }

  private boolean beamIsOn() {
    return state.run.isPresent()
        && !time.instant().isBefore(state.run.get().firstElectron())
        && time.instant()
            .isBefore(state.run.get().firstElectron().plusNanos(path(state.run.get()).endNanos()));
  }

  private boolean highVoltageIsOn() {
    return !time.instant().isBefore(state.trippedUntil);
  }

  private Point stageTruly() {
    Point error = imperfection.stageError(state.moves);
    return state.stage.plus(error.xMetres(), error.yMetres());
  }

  private double seconds(Instant at) {
    return Duration.between(state.opened, at).toNanos() * 1e-9;
  }

  private void save() {
    if (!abandoned) {
      memory.accept(state);
    }
  }
}
