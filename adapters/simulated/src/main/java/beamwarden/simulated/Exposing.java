package beamwarden.simulated;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Exposure;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.CurrentReading;
import beamwarden.instrument.Fault;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.Grant;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.ModeAbility;
import beamwarden.instrument.Receipt;
import beamwarden.instrument.StopWhen;
import beamwarden.quantity.Current;
import java.time.Duration;
import java.time.Instant;
import java.util.Optional;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/**
 * One grant, from its turn to its receipt.
 *
 * <p>The order of steps: refuse or note that it begins; say so; beam on; beam off, the truth
 * written by the hardware; data on disk; receipt kept; receipt sent. After a crash between note and
 * receipt the adapter cannot say what was done.
 */
final class Exposing implements Order {
  private static final Logger LOGGER = LoggerFactory.getLogger(Exposing.class);

  private static final int PROGRESS_EVENTS = 10;
  private static final Duration PROGRESS_EVERY = Duration.ofSeconds(1);
  private static final int LOOKS_AT_THE_CURRENT = 16;
  private static final double WELL_ABOVE = 1.2;
  private static final Outcome NOTHING =
      new Outcome(new BeamPath.Reach(0, 0, 0), new Current(0), new Current(0));

  private final Desk desk;
  private final Grant grant;
  private final GrantRules rules;
  private final Hardware hardware;
  private Runnable done = () -> {};
  private boolean running;
  private Instant firstElectron = Instant.MAX;

  Exposing(Desk desk, Grant grant, GrantRules rules) {
    this.desk = desk;
    this.grant = grant;
    this.rules = rules;
    this.hardware = desk.hardware();
  }

  Grant grant() {
    return grant;
  }

  /** Whether the scan engine runs under it. */
  boolean isRunning() {
    return running;
  }

  /** Forbids it: it has not started, and never will. */
  void refuse(Fault fault) {
    desk.refuse(grant.number(), fault);
  }

  @Override
  public void start(Runnable whenDone) {
    done = whenDone;
    desk.strike(FaultPlan.Step.BEFORE_BEGUN_NOTE);
    if (desk.hasEnded()) {
      return;
    }
    Optional<Fault> refusal = rules.refuses(grant);
    if (refusal.isPresent()) {
      refuse(refusal.get());
      done.run();
      return;
    }
    desk.notes().begun(grant.number());
    hardware.countExposure();
    Optional<FaultPlan.Strike> strike = desk.strike(FaultPlan.Step.AFTER_BEGUN_NOTE);
    if (!desk.hasEnded()) {
      desk.say(new InstrumentEvent.Begun(grant.number()));
      expose(Measuring.timeout(strike).or(hardware::unfit));
    }
  }

  private void expose(Optional<Fault> fault) {
    if (fault.isPresent()) {
      finish(NOTHING, fault);
      return;
    }
    Exposure exposure = grant.exposure();
    firstElectron = hardware.time().instant().plus(ability().frameStart());
    hardware.scan(
        new Run(
            grant.number(),
            grant.fence(),
            exposure.sample(),
            exposure.placement(),
            exposure.scan(),
            limitNanos(),
            firstElectron));
    running = true;
    watchLease();
    watchCurrent();
    tellProgress();
    plan(desk.strike(FaultPlan.Step.MID_EXPOSURE));
  }

  /** A scan that fits ends by itself; any other is cut so that the blanking still fits. */
  private long limitNanos() {
    Duration most = grant.longestBeamOn();
    Duration needed = grant.exposure().scan().beamOn();
    boolean fits = blanker().kind() == Blanker.Kind.FAST && needed.compareTo(most) <= 0;
    return fits ? most.toNanos() : most.minus(reaction()).toNanos();
  }

  /** Ends it as asked. */
  void stop(StopWhen when) {
    Instant now = hardware.time().instant();
    if (when == StopWhen.NOW || !now.isAfter(firstElectron)) {
      endAt(now.plus(blankingTakes()), Optional.empty());
      return;
    }
    long boundary =
        hardware
            .path()
            .orElseThrow()
            .boundaryFrom(nanosSinceFirst(now), ability().stopsAt(), ability().longestDwell());
    endAt(firstElectron.plusNanos(boundary), Optional.empty());
  }

  /** Blanks at once and finishes; nothing went wrong. */
  void endNow() {
    endNow(Optional.empty());
  }

  private void endNow(Optional<Fault> fault) {
    hardware.cutAt(hardware.time().instant()).ifPresent(outcome -> finish(outcome, fault));
  }

  /** The scan engine is done. */
  void scanOver(Outcome outcome) {
    finish(outcome, Optional.empty());
  }

  /** Something else took the beam. */
  void beamLost(Fault fault, Outcome cut) {
    finish(cut, Optional.of(fault));
  }

  private void endAt(Instant off, Optional<Fault> fault) {
    desk.later(
        Duration.between(hardware.time().instant(), off),
        () -> {
          if (running) {
            hardware.cutAt(off).ifPresent(outcome -> finish(outcome, fault));
          }
        });
  }

  /** The lease counts from the last heartbeat; a newer one only moves the next look. */
  private void watchLease() {
    long over = desk.heartbeats().last().orElseThrow() + grant.lease().toNanos();
    Duration left = Duration.ofNanos(over - hardware.time().elapsedNanos());
    Instant due = hardware.time().instant().plus(left);
    desk.later(left, () -> lookAtLease(over, due));
  }

  private void lookAtLease(long over, Instant due) {
    if (!running) {
      return;
    }
    if (desk.heartbeats().last().orElseThrow() + grant.lease().toNanos() > over) {
      watchLease();
      return;
    }
    endAt(
        due.plus(blankingTakes()),
        Optional.of(new Fault(FaultKind.LEASE_ENDED, "no heartbeat came within " + grant.lease())));
  }

  /** Ends the exposure when the monitor shows too much: now, or wherever the drift leads to. */
  void watchCurrent() {
    Instant now = hardware.time().instant();
    Instant from = now.isAfter(firstElectron) ? now : firstElectron;
    long left = Math.max(0, endNanos() - nanosSinceFirst(from));
    for (int look = 0; look <= LOOKS_AT_THE_CURRENT; look++) {
      Instant at = from.plusNanos(left / LOOKS_AT_THE_CURRENT * look);
      Current shown = hardware.monitored(grant.number(), at);
      if (shown.compareTo(grant.highestCurrent()) > 0) {
        endAt(at.plus(reaction()), Optional.of(tooMuch(shown)));
        return;
      }
    }
  }

  private Fault tooMuch(Current shown) {
    return new Fault(
        FaultKind.CURRENT_OUT_OF_BOUNDS,
        "the current of %s is above the %s that grant %d allows"
            .formatted(shown, grant.highestCurrent(), grant.number()));
  }

  private void tellProgress() {
    Duration whole = Duration.ofNanos(endNanos());
    Duration share = whole.dividedBy(PROGRESS_EVENTS);
    Duration every = share.compareTo(PROGRESS_EVERY) > 0 ? share : PROGRESS_EVERY;
    if (whole.compareTo(every) > 0) {
      tellProgressAfter(ability().frameStart().plus(every), every);
    }
  }

  private void tellProgressAfter(Duration wait, Duration every) {
    desk.later(
        wait,
        () -> {
          if (running) {
            long units =
                hardware
                    .path()
                    .orElseThrow()
                    .at(nanosSinceFirst(hardware.time().instant()))
                    .unitsDone();
            desk.say(new InstrumentEvent.Progress(grant.number(), units));
            tellProgressAfter(every, every);
          }
        });
  }

  /** Lets something go wrong in the middle of the exposure. */
  private void plan(Optional<FaultPlan.Strike> strike) {
    strike.ifPresent(
        struck ->
            desk.later(
                Duration.between(
                    hardware.time().instant(),
                    firstElectron.plusNanos((long) (endNanos() * struck.share()))),
                () -> strikeNow(struck.mishap())));
  }

  private void strikeNow(Mishap mishap) {
    if (!running) {
      return;
    }
    switch (mishap) {
      case DETECTOR_TIMEOUT ->
          endNow(
              Optional.of(
                  new Fault(FaultKind.DETECTOR_TIMEOUT, "the detector did not answer in time")));
      case CURRENT_OUT_OF_BOUNDS -> {
        double flows = hardware.trueCurrent().orElseThrow().amperes();
        hardware.surge(WELL_ABOVE * Math.max(1, grant.highestCurrent().amperes() / flows));
      }
      default -> desk.happen(mishap);
    }
  }

  private void finish(Outcome outcome, Optional<Fault> fault) {
    running = false;
    Current between = new Current((outcome.lowest().amperes() + outcome.highest().amperes()) / 2);
    Detector.Counted counted = desk.detector().count(grant, outcome.reach().unitsDone(), between);
    desk.strike(FaultPlan.Step.BEFORE_RECEIPT_KEPT);
    if (desk.hasEnded()) {
      return;
    }
    Receipt receipt = receipt(outcome, counted, fault);
    desk.notes().keep(receipt);
    desk.strike(FaultPlan.Step.AFTER_RECEIPT_KEPT);
    if (!desk.hasEnded()) {
      LOGGER
          .atDebug()
          .addKeyValue("grant", receipt.grant())
          .addKeyValue("units", receipt.unitsDone())
          .addKeyValue("fault", receipt.fault())
          .log("exposed");
      desk.say(new InstrumentEvent.Ended(receipt));
      done.run();
    }
  }

  private Receipt receipt(Outcome outcome, Detector.Counted counted, Optional<Fault> fault) {
    BeamPath.Reach reach = outcome.reach();
    boolean watched = reach.beamOnNanos() > 0;
    BeamSettings beam = grant.exposure().conditions().beam();
    return new Receipt(
        grant.number(),
        grant.fence(),
        reach.unitsDone(),
        reach.unitsTouched(),
        Duration.ofNanos(reach.beamOnNanos()),
        watched ? Optional.of(new CurrentReading(beam, outcome.lowest())) : Optional.empty(),
        watched ? Optional.of(new CurrentReading(beam, outcome.highest())) : Optional.empty(),
        counted.counts(),
        counted.files(),
        fault);
  }

  private long endNanos() {
    return hardware.path().orElseThrow().endNanos();
  }

  private long nanosSinceFirst(Instant at) {
    return Duration.between(firstElectron, at).toNanos();
  }

  private ModeAbility ability() {
    return hardware.abilities().modes().get(grant.exposure().conditions().mode());
  }

  private Blanker blanker() {
    return hardware.abilities().blanker();
  }

  /** The longest time from a cause to a blanked beam. */
  private Duration reaction() {
    return blanker().alone().orElse(Duration.ZERO);
  }

  private Duration blankingTakes() {
    return hardware.blankingTakes(grant.number());
  }
}
