package beamwarden.run;

import beamwarden.beam.Conditions;
import beamwarden.beam.Exposure;
import beamwarden.beam.Point;
import beamwarden.beam.SpotScan;
import beamwarden.dose.CapVerdict;
import beamwarden.dose.Caps;
import beamwarden.dose.Deliveries;
import beamwarden.dose.Delivery;
import beamwarden.dose.Done;
import beamwarden.estimate.Timings;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.ledger.Entry;
import beamwarden.ledger.Entry.Noted.What;
import beamwarden.ledger.JobRecord;
import beamwarden.ledger.SampleRecord;
import beamwarden.plan.Fitting;
import beamwarden.plan.Readiness;
import beamwarden.queue.JobState;
import beamwarden.shift.Shift;
import java.time.Duration;
import java.time.Instant;
import java.util.Optional;

/**
 * Chooses what is exposed next, and brings the instrument there: prepare, measure the current, then
 * store the grant.
 */
final class WorkSteps {
  private final RunSetup setup;
  private final JobSteps jobs;
  private final Fitting fitting;

  WorkSteps(RunSetup setup) {
    this.setup = setup;
    this.jobs = new JobSteps(setup);
    this.fitting = new Fitting(setup.profile().abilities());
  }

  /** Starts the next piece of work; false when the shift has none. */
  boolean decide(Turn turn, Shift shift) {
    for (JobRecord record : setup.planner().order(turn.books.jobs(), turn.now)) {
      if (jobs.settle(turn, record)) {
        return true;
      }
      if (jobs.mayRun(turn, record) && expose(turn, record, shift)) {
        return true;
      }
    }
    return false;
  }

  private boolean expose(Turn turn, JobRecord record, Shift shift) {
    SampleRecord sample = turn.books.sample(record.job().sample()).orElseThrow();
    Optional<Fitting.Piece> piece =
        fitting.next(
            record.job(),
            sample.sample(),
            record.effectiveDone(),
            record.trim(),
            turn.view.readiness(),
            shift,
            turn.books.beamOnThisShift(),
            turn.now);
    if (piece.isEmpty()) {
      return false;
    }
    turn.standingBy = "";
    Exposure exposure = piece.get().exposure();
    if (!turn.view.readiness().isAt(exposure, abilities())) {
      prepare(turn, record, piece.get());
    } else if (!turn.view.readiness().hasReading(exposure, turn.now, abilities())) {
      measure(turn, record, exposure);
    } else {
      grant(turn, record, sample, exposure);
    }
    return true;
  }

  private void prepare(Turn turn, JobRecord record, Fitting.Piece piece) {
    Conditions conditions = piece.exposure().conditions();
    Point target = piece.exposure().stageTarget();
    long request = turn.nextRequest();
    Instant due = turn.now.plus(piece.preparation()).plus(setup.waits().answerWithin());
    turn.doing = new Doing.Preparing(request, record.job().id(), conditions, target, due);
    turn.send(new Command.Prepare(request, conditions, target));
  }

  private void measure(Turn turn, JobRecord record, Exposure exposure) {
    long request = turn.nextRequest();
    Instant due =
        turn.now.plus(abilities().meter().readingTakes()).plus(setup.waits().answerWithin());
    turn.doing = new Doing.Measuring(request, record.job().id(), exposure.conditions().beam(), due);
    turn.send(new Command.Measure(request));
  }

  private void grant(Turn turn, JobRecord record, SampleRecord sample, Exposure exposure) {
    Delivery inFull = planned(turn, exposure, turn.books.lastGrant() + 1);
    CapVerdict verdict = Caps.admit(sample.sample(), sample.dose(), inFull);
    if (verdict instanceof CapVerdict.Refused refused) {
      JobSteps.stopAtCap(turn, record, refused);
      return;
    }
    if (record.state() != JobState.RUNNING) {
      turn.write(new Entry.JobChanged(record.job().id(), JobState.RUNNING, Optional.empty(), ""));
    }
    turn.current = Optional.of(open(turn, inFull));
  }

  private Slot open(Turn turn, Delivery inFull) {
    Entry.GrantOpened opened =
        new Entry.GrantOpened(inFull, inFull.upperBeamOn(), turn.link.session());
    turn.write(opened);
    return Slot.storing(opened);
  }

  private Delivery planned(Turn turn, Exposure exposure, long grant) {
    return Deliveries.planned(
        exposure,
        abilities(),
        turn.view.reading().orElseThrow().current(),
        grant,
        turn.view.stay());
  }

  /** Stores the next grant of the same stretch while the current one exposes. */
  void lookAhead(Turn turn, Shift shift) {
    Slot slot = turn.current.orElseThrow();
    if (slot.phase() != Slot.Phase.EXPOSING || slot.lookedAhead() || slot.stopping()) {
      return;
    }
    turn.current = Optional.of(slot.asLookedAhead());
    Exposure running = slot.opened().exposure();
    JobRecord record = turn.books.job(running.job()).orElseThrow();
    SampleRecord sample = turn.books.sample(running.sample()).orElseThrow();
    Done done = record.effectiveDone().plus(running.pass(), running.scan().units());
    Instant start = turn.now.plus(Timings.exposure(running, abilities()));
    Duration beamOn = turn.books.beamOnThisShift().plus(slot.opened().longestBeamOn());
    fitting
        .next(
            record.job(),
            sample.sample(),
            done,
            record.trim(),
            turn.view.readiness(),
            shift,
            beamOn,
            start)
        .filter(piece -> piece.before().isZero())
        .map(Fitting.Piece::exposure)
        .filter(next -> !(next.scan() instanceof SpotScan) || next.pass() == running.pass())
        .map(next -> planned(turn, next, turn.books.lastGrant() + 1))
        .filter(
            next -> Caps.admit(sample.sample(), sample.dose(), next) instanceof CapVerdict.Admitted)
        .ifPresent(next -> turn.next = Optional.of(open(turn, next)));
  }

  void prepared(Turn turn, InstrumentEvent.Prepared prepared) {
    if (!(turn.doing instanceof Doing.Preparing wanted) || wanted.request() != prepared.request()) {
      return;
    }
    turn.doing = new Doing.Nothing();
    boolean there =
        prepared.conditions().equals(wanted.conditions())
            && Readiness.samePlace(prepared.stage(), wanted.stage(), abilities());
    if (!there) {
      turn.view = turn.view.unprepared();
      turn.note(
          What.STOPPED,
          wanted.job()
              + ": the instrument reads back "
              + prepared.conditions()
              + " where "
              + wanted.conditions()
              + " was set; check it");
      return;
    }
    turn.view =
        turn.view.prepared(prepared.conditions(), wanted.stage(), stay(turn, wanted.stage()));
  }

  /** A new stretch begins whenever the stage may have moved. */
  private static long stay(Turn turn, Point target) {
    boolean still = turn.view.stage().equals(Optional.of(target)) && turn.view.stay() > 0;
    return still ? turn.view.stay() : turn.books.lastGrant() + 1;
  }

  void notPrepared(Turn turn, InstrumentEvent.NotPrepared refused) {
    if (turn.doing instanceof Doing.Preparing wanted && wanted.request() == refused.request()) {
      turn.doing = new Doing.Nothing();
      turn.view = turn.view.unprepared();
      jobs.faulted(turn, wanted.job(), refused.fault());
    }
  }

  void measured(Turn turn, InstrumentEvent.Measured measured) {
    if (!(turn.doing instanceof Doing.Measuring wanted) || wanted.request() != measured.request()) {
      return;
    }
    turn.doing = new Doing.Nothing();
    if (measured.reading().settings().equals(wanted.settings())) {
      turn.view = turn.view.measured(measured.reading(), turn.now, turn.books.lastGrant() + 1);
      Booking.reading(turn, setup.profile(), measured.reading());
    } else {
      turn.note(
          What.STOPPED,
          wanted.job() + ": the current was read under other settings than were set; check it");
    }
  }

  void notMeasured(Turn turn, InstrumentEvent.NotMeasured refused) {
    if (turn.doing instanceof Doing.Measuring wanted && wanted.request() == refused.request()) {
      turn.doing = new Doing.Nothing();
      jobs.faulted(turn, wanted.job(), refused.fault());
    }
  }

  private Abilities abilities() {
    return setup.profile().abilities();
  }
}
