package beamwarden.simulated;

import beamwarden.instrument.Fault;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.InstrumentEvent;
import java.io.UncheckedIOException;
import java.time.Duration;
import java.util.HashMap;
import java.util.Map;
import java.util.Optional;
import java.util.function.Consumer;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/**
 * The living adapter's desk: what its orders work with, and the ways in which it can come to an
 * end. Everything on it is guarded by the hardware's lock.
 */
final class Desk {
  private static final Logger LOGGER = LoggerFactory.getLogger(Desk.class);
  private static final double SURGE = 2;

  private final Hardware hardware;
  private final Notes notes;
  private final Detector detector;
  private final Runnable death;
  private final Link link = new Link();
  private final Heartbeats heartbeats = new Heartbeats();
  private final Turns turns = new Turns();
  private final Map<Long, Fault> refused = new HashMap<>();
  private final Watcher watching = new Watching(this);
  private boolean ended;

  /**
   * A desk.
   *
   * @param death what becomes of the process when it dies
   */
  Desk(Hardware hardware, Notes notes, Detector detector, Runnable death) {
    this.hardware = hardware;
    this.notes = notes;
    this.detector = detector;
    this.death = death;
  }

  /** Takes the hardware over; a scan that an earlier adapter left running is blanked. */
  void takeOver() {
    synchronized (hardware) {
      hardware.drivenBy(watching);
      for (FaultPlan.Timed timed : faults().timed()) {
        Duration wait = timed.after().minus(hardware.sinceOpened());
        if (!wait.isNegative()) {
          later(wait, () -> happen(timed.mishap()));
        }
      }
    }
  }

  Hardware hardware() {
    return hardware;
  }

  Notes notes() {
    return notes;
  }

  Detector detector() {
    return detector;
  }

  Heartbeats heartbeats() {
    return heartbeats;
  }

  Turns turns() {
    return turns;
  }

  Link link() {
    return link;
  }

  /** The grant under which the scan engine runs. */
  Optional<Exposing> running() {
    return turns.exposing().filter(Exposing::isRunning);
  }

  void say(InstrumentEvent event) {
    link.say(event);
  }

  /** Tells the listener of this connection only. */
  Consumer<InstrumentEvent> answer() {
    return link.answer();
  }

  /** Forbids a grant for good, and says so. */
  void refuse(long grant, Fault fault) {
    refused.put(grant, fault);
    link.say(new InstrumentEvent.NotBegun(grant, fault));
  }

  /** Why a grant was refused earlier. */
  Optional<Fault> refusal(long grant) {
    return Optional.ofNullable(refused.get(grant));
  }

  /** A raised fence forbids what was refused under a lower one. */
  void forgetRefusals() {
    refused.clear();
  }

  /** Forbids the grants that wait for their turn. */
  void dropGrants(String why) {
    for (Exposing dropped : turns.dropGrants()) {
      refuse(dropped.grant().number(), new Fault(FaultKind.STARTED_TOO_LATE, why));
    }
  }

  /** Forbids what waits, then ends what runs. */
  void blank(String why) {
    dropGrants(why);
    running().ifPresent(Exposing::endNow);
  }

  /** Runs a task later, unless the adapter has ended by then. */
  void later(Duration delay, Runnable task) {
    hardware.time().after(delay, () -> guarded(task));
  }

  /** Runs a task now; an adapter that cannot write its notes must not go on. */
  void guarded(Runnable task) {
    synchronized (hardware) {
      if (ended) {
        return;
      }
      try {
        task.run();
      } catch (UncheckedIOException failure) {
        LOGGER.error("the simulated instrument cannot write", failure);
        die(failure.getMessage());
      }
    }
  }

  /**
   * Lets the fault plan strike at a step. What it did is answered; after it the adapter may have
   * {@linkplain #hasEnded() ended}. What strikes in the middle of an exposure is only answered.
   */
  Optional<FaultPlan.Strike> strike(FaultPlan.Step step) {
    boolean begun = turns.exposing().filter(Exposing::hasBegun).isPresent();
    long number = hardware.exposed() + (begun ? 0 : 1);
    Optional<FaultPlan.Strike> strike = faults().at(step, number);
    if (step != FaultPlan.Step.MID_EXPOSURE) {
      strike.ifPresent(struck -> happen(struck.mishap()));
    }
    return strike;
  }

  /** Lets something go wrong now. */
  void happen(Mishap mishap) {
    LOGGER.atInfo().addKeyValue("fault", mishap.text()).log("a simulated fault");
    switch (mishap) {
      case LOST_CONNECTION -> lose();
      case PROCESS_DIES -> die("the adapter's process ended");
      case DOOR_OPENED -> hardware.openDoor();
      case HIGH_VOLTAGE_TRIP -> hardware.tripHighVoltage();
      case CURRENT_OUT_OF_BOUNDS -> hardware.surge(SURGE);
      case DETECTOR_TIMEOUT -> LOGGER.debug("the detector is asked for nothing now");
    }
  }

  /** The connection is cut. */
  void lose() {
    link.say(new InstrumentEvent.Lost("the connection to the instrument is gone"));
    link.cut();
  }

  /** The process ends without warning; the hardware goes on. */
  void die(String reason) {
    LOGGER.atWarn().addKeyValue("reason", reason).log("the simulated adapter dies");
    if (hardware.simulation().onDisk()) {
      hardware.abandon();
    }
    link.say(new InstrumentEvent.Lost(reason));
    end();
    death.run();
  }

  /** The end: nothing is done or said any more. */
  void end() {
    ended = true;
    link.cut();
    hardware.drivenByNobody(watching);
  }

  boolean hasEnded() {
    synchronized (hardware) {
      return ended;
    }
  }

  private FaultPlan faults() {
    return hardware.simulation().faults();
  }
}
