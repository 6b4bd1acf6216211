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

  private static final double WELL_ABOVE = 1.2;
  private static final Outcome NOTHING =
      new Outcome(new BeamPath.Reach(0, 0, 0), new Current(0), new Current(0));

  private final Desk desk;
  private final Grant grant;
  private final GrantRules rules;
  private final Hardware hardware;
  private final Lookout lookout;
  private Runnable done = () -> {};
  private boolean begun;
  private boolean running;
  private Instant firstElectron = Instant.MAX;

  Exposing(Desk desk, Grant grant, GrantRules rules) {
    this.desk = desk;
    this.grant = grant;
    this.rules = rules;
    this.hardware = desk.hardware();
    this.lookout = new Lookout(this, desk);
  }

  Grant grant() {
    return grant;
  }

  /** Whether it is noted that it began. */
  boolean hasBegun() {
    return begun;
  }

  /** Whether the scan engine runs under it. */
  boolean isRunning() {
    return running;
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
      desk.refuse(grant.number(), refusal.get());
      done.run();
      return;
    }
    desk.notes().begun(grant.number());
    begun = true;
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
    lookout.start();
    plan(desk.strike(FaultPlan.Step.MID_EXPOSURE));
  }

  /** A scan that fits ends by itself; any other is cut so that the blanking still fits. */
  private long limitNanos() {
    boolean fast = blanker().kind() == Blanker.Kind.FAST;
    BeamPath whole = new BeamPath(grant.exposure().scan(), fast, Long.MAX_VALUE);
    long most = grant.longestBeamOn().toNanos();
    return whole.beamOnNanos(Long.MAX_VALUE) <= most ? most : most - reaction().toNanos();
  }

  /** Looks at the current anew: it has jumped. */
  void watchCurrent() {
    lookout.watchCurrent();
  }

  /** Ends it as asked. */
  void stop(StopWhen when) {
    Instant now = hardware.time().instant();
    if (when == StopWhen.NOW || !now.isAfter(firstElectron)) {
      endAt(now.plus(blankingTakes()), Optional.empty());
      return;
    }
    long boundary =
        path().boundaryFrom(nanosSinceFirst(now), ability().stopsAt(), ability().longestDwell());
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

  /** Ends it at a moment to come, unless it has ended by then. */
  void endAt(Instant off, Optional<Fault> fault) {
    desk.later(
        Duration.between(hardware.time().instant(), off),
        () -> {
          if (running) {
            hardware.cutAt(off).ifPresent(outcome -> finish(outcome, fault));
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
                    firstElectron.plusNanos((long) (path().endNanos() * struck.share()))),
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

  /** The path of the beam; it runs. */
  BeamPath path() {
    return hardware.path().orElseThrow();
  }

  /** When the first electron comes. */
  Instant firstElectron() {
    return firstElectron;
  }

  long nanosSinceFirst(Instant at) {
    return Duration.between(firstElectron, at).toNanos();
  }

  ModeAbility ability() {
    return hardware.abilities().modes().get(grant.exposure().conditions().mode());
  }

  private Blanker blanker() {
    return hardware.abilities().blanker();
  }

  /** The longest time from a cause to a blanked beam. */
  Duration reaction() {
    return blanker().alone().orElse(Duration.ZERO);
  }

  Duration blankingTakes() {
    return hardware.blankingTakes(grant.number());
  }
}
