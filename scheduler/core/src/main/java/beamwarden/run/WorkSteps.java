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
import beamwarden.dose.Exposures;
import beamwarden.estimate.Timings;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.CurrentReading;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.ledger.Entry;
import beamwarden.ledger.Entry.Noted.What;
import beamwarden.ledger.JobRecord;
import beamwarden.ledger.SampleRecord;
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
  /** How far a read-back of the stage may be from where it was sent, its repeatability apart. */
  private static final double STAGE_ROUNDING_METRES = 1e-9;

  /** Longer than any exposure. */
  private static final Duration ENDLESS = Duration.ofDays(10_000);

  private final RunSetup setup;
  private final JobSteps jobs;

  WorkSteps(RunSetup setup) {
    this.setup = setup;
    this.jobs = new JobSteps(setup);
  }

  /** Starts the next piece of work; false when the shift has none. */
  boolean decide(Turn turn, Shift shift) {
    for (JobRecord record : setup.planner().order(turn.books.jobs(), turn.now)) {
      SampleRecord sample = turn.books.sample(record.job().sample()).orElseThrow();
      if (jobs.settle(turn, record, nothingLeft(record, sample))) {
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
    Optional<Exposure> exposure = fitting(turn, record, record.effectiveDone(), sample, shift);
    if (exposure.isEmpty()) {
      return false;
    }
    turn.standingBy = "";
    if (!prepared(turn, exposure.get())) {
      prepare(turn, record, exposure.get());
    } else if (readingFor(turn, exposure.get(), turn.now).isEmpty()) {
      measure(turn, record, exposure.get());
    } else {
      grant(turn, record, sample, exposure.get());
    }
    return true;
  }

  /** The next exposure of a job that can still end before the shift's wind-down, if any. */
  private Optional<Exposure> fitting(
      Turn turn, JobRecord record, Done done, SampleRecord sample, Shift shift) {
    Optional<Exposure> whole = next(record, done, sample, ENDLESS);
    if (whole.isEmpty()) {
      return whole;
    }
    Instant start = turn.now.plus(before(turn, whole.get()));
    if (shift.latestStart().filter(start::isAfter).isPresent()) {
      return Optional.empty();
    }
    Instant end =
        record.job().deadline().filter(shift.usableEnd()::isAfter).orElse(shift.usableEnd());
    Duration left =
        Duration.between(start, end)
            .minus(Timings.frameStart(whole.get(), abilities()))
            .minus(abilities().blanker().alone().orElse(Duration.ZERO));
    Duration budget =
        shift.beamOnBudget().map(most -> most.minus(turn.books.beamOnThisShift())).orElse(ENDLESS);
    Duration most = left.compareTo(budget) < 0 ? left : budget;
    return most.isNegative() || most.isZero() ? Optional.empty() : next(record, done, sample, most);
  }

  private Optional<Exposure> next(
      JobRecord record, Done done, SampleRecord sample, Duration longest) {
    return Exposures.next(record.job(), sample.sample(), abilities(), done, record.trim(), longest);
  }

  /** Whether a job has nothing left to expose. */
  boolean nothingLeft(JobRecord record, SampleRecord sample) {
    return Exposures.next(
            record.job(), sample.sample(), abilities(), record.effectiveDone(), record.trim())
        .isEmpty();
  }

  /** The time before an exposure can begin. */
  private Duration before(Turn turn, Exposure exposure) {
    Duration preparation = prepared(turn, exposure) ? Duration.ZERO : preparation(turn, exposure);
    Duration reading =
        readingFor(turn, exposure, turn.now).isPresent()
            ? Duration.ZERO
            : abilities().meter().readingTakes();
    return preparation.plus(reading);
  }

  private Duration preparation(Turn turn, Exposure exposure) {
    return Timings.preparation(
        turn.view.conditions(),
        turn.view.stage(),
        exposure.conditions(),
        exposure.stageTarget(),
        abilities());
  }

  private boolean prepared(Turn turn, Exposure exposure) {
    double tolerance = abilities().stage().repeatabilityMetres() + STAGE_ROUNDING_METRES;
    return turn.view.conditions().equals(Optional.of(exposure.conditions()))
        && turn.view
            .stage()
            .filter(at -> at.distanceMetres(exposure.stageTarget()) <= tolerance)
            .isPresent();
  }

  private void prepare(Turn turn, JobRecord record, Exposure exposure) {
    Conditions conditions = exposure.conditions();
    Point target = exposure.stageTarget();
    long request = turn.nextRequest();
    Instant due = turn.now.plus(preparation(turn, exposure)).plus(setup.waits().answerWithin());
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

  /** The reading on which a grant may rest: it must still hold when the exposure ends. */
  private Optional<CurrentReading> readingFor(Turn turn, Exposure exposure, Instant start) {
    Instant end = start.plus(Timings.exposure(exposure, abilities()));
    Instant expires =
        turn.view.reading().isEmpty()
            ? Instant.MIN
            : turn.view.readAt().plus(abilities().meter().readingEvery());
    return turn.view
        .reading()
        .filter(reading -> reading.settings().equals(exposure.conditions().beam()))
        .filter(reading -> !end.isAfter(expires));
  }

  private void grant(Turn turn, JobRecord record, SampleRecord sample, Exposure exposure) {
    Delivery inFull = planned(turn, exposure, turn.books.lastGrant() + 1);
    CapVerdict verdict = Caps.admit(sample.sample(), sample.dose(), inFull);
    if (verdict instanceof CapVerdict.Refused refused) {
      jobs.stopAtCap(turn, record, refused);
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
    Duration left = Timings.exposure(running, abilities());
    Instant start = turn.now.plus(left);
    fitting(turn, record, done, sample, shift)
        .filter(next -> prepared(turn, next))
        .filter(next -> readingFor(turn, next, start).isPresent())
        .filter(next -> endsInTime(next, start, shift))
        .filter(next -> !(next.scan() instanceof SpotScan) || next.pass() == running.pass())
        .map(next -> planned(turn, next, turn.books.lastGrant() + 1))
        .filter(
            next -> Caps.admit(sample.sample(), sample.dose(), next) instanceof CapVerdict.Admitted)
        .ifPresent(next -> turn.next = Optional.of(open(turn, next)));
  }

  private boolean endsInTime(Exposure next, Instant start, Shift shift) {
    Instant end = start.plus(Timings.exposure(next, abilities()));
    return !end.isAfter(shift.usableEnd());
  }

  void prepared(Turn turn, InstrumentEvent.Prepared prepared) {
    if (!(turn.doing instanceof Doing.Preparing wanted) || wanted.request() != prepared.request()) {
      return;
    }
    turn.doing = new Doing.Nothing();
    double off = prepared.stage().distanceMetres(wanted.stage());
    boolean there =
        prepared.conditions().equals(wanted.conditions())
            && off <= abilities().stage().repeatabilityMetres() + STAGE_ROUNDING_METRES;
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
