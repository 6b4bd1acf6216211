package beamwarden.simulated;

import beamwarden.beam.Conditions;
import beamwarden.beam.Point;
import beamwarden.instrument.Fault;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.Grant;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.Instrument;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.InstrumentListener;
import beamwarden.instrument.SealReport;
import beamwarden.instrument.StopWhen;
import java.io.UncheckedIOException;
import java.nio.file.Path;
import java.time.Duration;
import java.util.HashMap;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.function.Consumer;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/**
 * The adapter of the simulated instrument: the grant protocol over {@link Hardware} and {@link
 * Notes}, both of which outlive it.
 *
 * <p>To restart an adapter in memory, make another one over the same hardware and notes; the old
 * one ends without warning. Preparing, measuring, exposing and winding down happen in the order in
 * which they were asked for; all else at once. Everything happens on the thread of the line of
 * time, under the hardware's lock, so that verbs may be called from any thread.
 */
public final class SimulatedInstrument implements Instrument {
  private static final Logger LOGGER = LoggerFactory.getLogger(SimulatedInstrument.class);
  private static final double SURGE = 2;

  private final Hardware hardware;
  private final Notes notes;
  private final FaultPlan faults;
  private final Detector detector;
  private final Runnable death;
  private final Link link = new Link();
  private final Heartbeats heartbeats = new Heartbeats();
  private final Turns turns = new Turns();
  private final Map<Long, Fault> refused = new HashMap<>();
  private final Desk desk = new AtDesk();
  private final Watcher watching = new Watching();
  private final GrantRules rules;
  private boolean ended;

  /** An adapter in memory; its hardware says how it is simulated. */
  public SimulatedInstrument(Hardware hardware, Notes notes) {
    this(hardware, notes, Optional.empty(), () -> {});
  }

  /**
   * The same, with its data in a folder, if its hardware's simulation writes any.
   *
   * @param data the folder; made when it is missing
   */
  public SimulatedInstrument(Hardware hardware, Notes notes, Path data) {
    this(hardware, notes, Optional.of(new DataFolder(data, hardware.time())), () -> {});
  }

  /**
   * An adapter. A scan that an earlier one left running is blanked.
   *
   * @param folder where data goes, if any is written
   * @param death what becomes of the process when it dies
   */
  SimulatedInstrument(Hardware hardware, Notes notes, Optional<DataFolder> folder, Runnable death) {
    this.hardware = hardware;
    this.notes = notes;
    this.faults = hardware.simulation().faults();
    this.detector = new Detector(hardware.simulation(), folder);
    this.death = death;
    this.rules = new GrantRules(hardware, notes, heartbeats);
    synchronized (hardware) {
      hardware.drivenBy(watching);
      planTimedFaults();
    }
  }

  @Override
  public void connect(InstrumentListener listener) {
    hardware
        .time()
        .after(
            Duration.ZERO,
            () -> {
              if (hasEnded()) {
                listener.on(new InstrumentEvent.Lost("the adapter has ended: open it again"));
              }
            });
    post(
        () -> {
          link.to(listener);
          rules.sealed(false);
          turns.dropAll();
          heartbeats.startAnew();
          link.say(
              new InstrumentEvent.Connected(
                  hardware.abilities(), hardware.session(), hardware.readings()));
        });
  }

  @Override
  public void seal(long fence, String store, Set<Long> grants, boolean handOver) {
    Set<Long> asked = Set.copyOf(grants);
    postLinked(() -> sealNow(fence, store, asked, handOver));
  }

  @Override
  public void prepare(long request, Conditions conditions, Point stage) {
    postLinked(() -> turns.add(new Preparing(desk, request, conditions, stage)));
  }

  @Override
  public void measure(long request) {
    postLinked(() -> turns.add(new Measuring(desk, request)));
  }

  @Override
  public void begin(Grant grant) {
    postLinked(() -> beginNow(grant));
  }

  @Override
  public void stop(StopWhen when) {
    postLinked(
        () -> {
          dropGrants("a stop was asked for before the grant began");
          turns.exposing().filter(Exposing::isRunning).ifPresent(running -> running.stop(when));
        });
  }

  @Override
  public void heartbeat(long number) {
    postLinked(
        () -> {
          if (heartbeats.beat(number, hardware.time().elapsedNanos())) {
            link.say(new InstrumentEvent.HeartbeatSeen(number));
          }
        });
  }

  @Override
  public void acknowledge(long grant) {
    postLinked(() -> notes.forget(grant));
  }

  @Override
  public void windDown() {
    postLinked(
        () -> {
          blank("the instrument was wound down before the grant began");
          turns.add(new WindingDown(desk));
        });
  }

  /** Blanks the beam at once, keeps the receipt of what ran, and lets go. */
  @Override
  public void close() {
    synchronized (hardware) {
      if (!ended) {
        link.cut();
        turns.dropAll();
        turns.exposing().filter(Exposing::isRunning).ifPresent(Exposing::endNow);
        ended = true;
        hardware.drivenByNobody(watching);
      }
    }
  }

  /** The connection is cut from outside; {@link #connect} brings it back. */
  public void cutConnection() {
    synchronized (hardware) {
      lose();
    }
  }

  /** The adapter's process ends without warning; the hardware goes on. */
  public void die() {
    synchronized (hardware) {
      if (!ended) {
        dieNow("the adapter's process ended");
      }
    }
  }

  private void sealNow(long fence, String store, Set<Long> asked, boolean handOver) {
    boolean bound = !notes.store().isEmpty();
    boolean other = bound && !store.equals(notes.store());
    if (fence < notes.fence() || (other && (!handOver || fence == notes.fence()))) {
      link.say(new InstrumentEvent.SealRefused(notes.fence(), notes.store()));
      return;
    }
    boolean provable = notes.knows(store);
    notes.seal(fence, store, asked);
    rules.sealed(true);
    blank("the adapter was sealed before the grant began");
    refused.clear();
    desk.strike(FaultPlan.Step.SEAL);
    if (!ended) {
      link.say(new InstrumentEvent.Sealed(new SealReport(fence, store, fates(asked, provable))));
    }
  }

  /** A store whose grants these notes have never seen may have sent them to lost notes. */
  private Map<Long, GrantFate> fates(Set<Long> asked, boolean provable) {
    Map<Long, GrantFate> fates = new HashMap<>();
    for (long grant : asked) {
      GrantFate unreported =
          provable && !notes.hasBegun(grant) ? new GrantFate.NeverBegun() : new GrantFate.Unknown();
      fates.put(
          grant, notes.kept(grant).<GrantFate>map(GrantFate.Reported::new).orElse(unreported));
    }
    return fates;
  }

  private void beginNow(Grant grant) {
    boolean ours = grant.store().equals(notes.store());
    if (ours && (turns.holds(grant.number()) || notes.hasBegun(grant.number()))) {
      sayAgain(grant.number());
      return;
    }
    Optional<Fault> fault =
        Optional.ofNullable(refused.get(grant.number())).or(() -> rules.forbids(grant));
    if (fault.isPresent()) {
      desk.refuse(grant.number(), fault.get());
    } else {
      turns.add(new Exposing(desk, grant, rules));
    }
  }

  /**
   * A grant that comes again is never exposed again; its receipt is said again while it is kept.
   */
  private void sayAgain(long grant) {
    notes.kept(grant).ifPresent(receipt -> link.say(new InstrumentEvent.Ended(receipt)));
  }

  private void blank(String why) {
    dropGrants(why);
    turns.exposing().filter(Exposing::isRunning).ifPresent(Exposing::endNow);
  }

  private void dropGrants(String why) {
    for (Exposing dropped : turns.dropGrants()) {
      dropped.refuse(new Fault(FaultKind.STARTED_TOO_LATE, why));
    }
  }

  private void planTimedFaults() {
    for (FaultPlan.Timed timed : faults.timed()) {
      Duration wait = timed.after().minus(hardware.sinceOpened());
      if (!wait.isNegative()) {
        desk.later(wait, () -> desk.happen(timed.mishap()));
      }
    }
  }

  private void lose() {
    if (link.isUp()) {
      link.say(new InstrumentEvent.Lost("the connection to the instrument is gone"));
      link.cut();
    }
  }

  private void dieNow(String reason) {
    LOGGER.atWarn().addKeyValue("reason", reason).log("the simulated adapter dies");
    ended = true;
    if (hardware.simulation().onDisk()) {
      hardware.abandon();
    } else {
      hardware.drivenByNobody(watching);
    }
    link.say(new InstrumentEvent.Lost(reason));
    link.cut();
    death.run();
  }

  /** Whether it was closed or its process died; only another one over the same hardware helps. */
  public boolean hasEnded() {
    synchronized (hardware) {
      return ended;
    }
  }

  private void postLinked(Runnable verb) {
    post(
        () -> {
          if (link.isUp()) {
            verb.run();
          }
        });
  }

  private void post(Runnable verb) {
    desk.later(Duration.ZERO, verb);
  }

  /** Runs a step; an adapter that cannot write its notes must not go on. */
  private void guarded(Runnable task) {
    synchronized (hardware) {
      if (ended) {
        return;
      }
      try {
        task.run();
      } catch (UncheckedIOException failure) {
        LOGGER.error("the simulated instrument cannot write", failure);
        dieNow(failure.getMessage());
      }
    }
  }

  /** What orders see of this adapter. */
  private final class AtDesk implements Desk {
    @Override
    public Hardware hardware() {
      return hardware;
    }

    @Override
    public Notes notes() {
      return notes;
    }

    @Override
    public Heartbeats heartbeats() {
      return heartbeats;
    }

    @Override
    public Detector detector() {
      return detector;
    }

    @Override
    public void say(InstrumentEvent event) {
      link.say(event);
    }

    @Override
    public void refuse(long grant, Fault fault) {
      refused.put(grant, fault);
      link.say(new InstrumentEvent.NotBegun(grant, fault));
    }

    @Override
    public Consumer<InstrumentEvent> answer() {
      return link.answer();
    }

    @Override
    public void later(Duration delay, Runnable task) {
      hardware.time().after(delay, () -> guarded(task));
    }

    @Override
    public Optional<FaultPlan.Strike> strike(FaultPlan.Step step) {
      long number =
          hardware.exposed() + (turns.exposing().filter(Exposing::isRunning).isPresent() ? 0 : 1);
      Optional<FaultPlan.Strike> strike = faults.at(step, number);
      if (step != FaultPlan.Step.MID_EXPOSURE) {
        strike.ifPresent(struck -> happen(struck.mishap()));
      }
      return strike;
    }

    @Override
    public void happen(Mishap mishap) {
      LOGGER.atInfo().addKeyValue("fault", mishap.text()).log("a simulated fault");
      switch (mishap) {
        case LOST_CONNECTION -> lose();
        case PROCESS_DIES -> dieNow("the adapter's process ended");
        case DOOR_OPENED -> hardware.openDoor();
        case HIGH_VOLTAGE_TRIP -> hardware.tripHighVoltage();
        case CURRENT_OUT_OF_BOUNDS -> hardware.surge(SURGE);
        case DETECTOR_TIMEOUT -> LOGGER.debug("the detector is asked for nothing now");
      }
    }

    @Override
    public boolean hasEnded() {
      return ended;
    }
  }

  /** What the hardware tells this adapter. */
  private final class Watching implements Watcher {
    @Override
    public void scanOver(Outcome outcome) {
      guarded(() -> running().ifPresent(exposing -> exposing.scanOver(outcome)));
    }

    @Override
    public void beamLost(Fault fault, Optional<Outcome> cut) {
      guarded(
          () -> {
            Optional<Exposing> running = running();
            if (running.isPresent() && cut.isPresent()) {
              running.get().beamLost(fault, cut.get());
            } else {
              link.say(new InstrumentEvent.Trouble(fault));
            }
          });
    }

    @Override
    public void surged() {
      guarded(() -> running().ifPresent(Exposing::watchCurrent));
    }

    @Override
    public void replaced() {
      ended = true;
      link.cut();
    }

    private Optional<Exposing> running() {
      return turns.exposing().filter(Exposing::isRunning);
    }
  }
}
