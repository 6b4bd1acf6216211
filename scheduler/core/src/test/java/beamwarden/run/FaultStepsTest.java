package beamwarden.run;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.instrument.Fault;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.ledger.Entry;
import beamwarden.queue.JobState;
import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;

/** Faults by their class: try again, prepare afresh, give up the job, stop the night. */
class FaultStepsTest {
  private final Steps steps = Steps.exposing(Lab.map("survey"), Lab.map("close-up"));

  /** Grant {@code grant} ends after one line with a fault; all commands that follow. */
  private List<Command> fails(long grant, FaultKind kind) {
    steps.begins(grant).later(Lab.LINE);
    return steps.tell(
        new InstrumentEvent.Ended(steps.receipt(grant, 1, Lab.LINE, steps.fault(kind))));
  }

  @Test
  void aDetectorTimeOutIsTriedAgainHereAndItsDoseIsBooked() {
    List<Command> commands = fails(1, FaultKind.DETECTOR_TIMEOUT);
    assertEquals(3, Commands.only(Command.Begin.class, commands).grant().number());
    assertEquals(List.of(), Commands.of(Command.Prepare.class, commands));
    double line = Lab.UPPER_COULOMBS / 30;
    assertEquals(line + charge(3), steps.upperCoulombs(), 1e-15);
  }

  private double charge(long grant) {
    var inFull = steps.opened(grant).inFull();
    return inFull.upperCurrent().chargeIn(inFull.upperBeamOn()).coulombs();
  }

  @Test
  void afterMoreFaultsInARowThanTheProfilesRetriesTheJobHasFailedAndTheNightGoesOn() {
    fails(1, FaultKind.DETECTOR_TIMEOUT);
    fails(steps.books().lastGrant(), FaultKind.DETECTOR_TIMEOUT);
    assertEquals(JobState.RUNNING, steps.job("survey").state());
    fails(steps.books().lastGrant(), FaultKind.DETECTOR_TIMEOUT);
    assertEquals(JobState.FAILED, steps.job("survey").state());
    assertEquals("something went wrong (tried 3 times)", steps.job("survey").because());
    assertEquals("close-up", steps.opened(steps.books().lastGrant()).exposure().job());
  }

  @Test
  void anExposureWithoutFaultStartsTheCountAnew() {
    for (int tries = 0; tries < 3; tries++) {
      long grant = steps.state().current().orElseThrow().grant();
      fails(grant, FaultKind.DETECTOR_TIMEOUT);
      long next = steps.state().current().orElseThrow().grant();
      steps.begins(next).ends(next);
    }
    assertTrue(steps.job("survey").state() != JobState.FAILED);
  }

  @Test
  void whatWasLostIsRecoveredByPreparingAfresh() {
    List<Command> commands = fails(1, FaultKind.REGISTRATION_LOST);
    assertEquals(List.of(), Commands.of(Command.Begin.class, commands));
    assertEquals(1, Commands.of(Command.Prepare.class, commands).size());
  }

  @Test
  void whatCannotBeReachedEndsItsJobAndTheNightGoesOn() {
    fails(1, FaultKind.REGION_UNREACHABLE);
    assertEquals(JobState.FAILED, steps.job("survey").state());
    assertEquals("close-up", steps.opened(steps.books().lastGrant()).exposure().job());
  }

  @ParameterizedTest
  @EnumSource(
      value = FaultKind.class,
      names = {
        "INTERLOCK",
        "HIGH_VOLTAGE_TRIP",
        "VACUUM",
        "BLANKER_FAILURE",
        "CURRENT_OUT_OF_BOUNDS",
        "READINGS_DISAGREE"
      })
  void whatOnlyAPersonCanJudgeStopsTheNightAndWindsDown(FaultKind kind) {
    List<Command> commands = fails(1, kind);
    assertEquals(Optional.of("something went wrong"), steps.books().stopped());
    assertEquals(List.of(), Commands.of(Command.Begin.class, commands));
    assertTrue(tellsOfItself().state().doing() instanceof Doing.WindingDown);
    assertEquals(JobState.RUNNING, steps.job("survey").state());
  }

  /** A fault that stops the night puts the chamber session in doubt: here it is the same. */
  private Steps tellsOfItself() {
    steps.tell(Steps.connected("first"));
    return steps.sealed(Map.of());
  }

  @Test
  void aStoppedNightGoesOnOnlyWhenAPersonReleasesIt() {
    fails(1, FaultKind.HIGH_VOLTAGE_TRIP);
    tellsOfItself().tell(new InstrumentEvent.WoundDown(Steps.parked()));
    assertEquals(List.of(), Commands.of(Command.Prepare.class, steps.wake()));
    steps.ask(new Event.Wish.Release(List.of(), true));
    assertEquals("survey", steps.begin().exposure().job());
  }

  @Test
  void conditionsThatAreNotReachedUseUpTries() {
    Steps fresh = Steps.online(Lab.map("survey"), Lab.map("close-up"));
    for (int tries = 0; tries < 3; tries++) {
      long request = ((Doing.Preparing) fresh.state().doing()).request();
      fresh.tell(
          new InstrumentEvent.NotPrepared(
              request, new Fault(FaultKind.FOCUS_LOST, "no focus was found")));
    }
    assertEquals(JobState.FAILED, fresh.job("survey").state());
    assertEquals("no focus was found (tried 3 times)", fresh.job("survey").because());
    assertEquals("close-up", ((Doing.Preparing) fresh.state().doing()).job());
  }

  @Test
  void aReadingThatCannotBeTakenUsesUpTries() {
    Steps fresh = Steps.online(Lab.map("survey"), Lab.map("close-up"));
    fresh.untilMeasuring();
    for (int tries = 0; tries < 3; tries++) {
      long request = ((Doing.Measuring) fresh.state().doing()).request();
      fresh.tell(
          new InstrumentEvent.NotMeasured(
              request, new Fault(FaultKind.DETECTOR_TIMEOUT, "the cup does not answer")));
    }
    assertEquals(JobState.FAILED, fresh.job("survey").state());
  }

  @Test
  void aGrantThatTheInstrumentRefusesIsVoidAndUsesUpATry() {
    Steps fresh = Steps.online(Lab.map("survey"), Lab.map("close-up"));
    for (long grant = 1; grant <= 3; grant++) {
      assertEquals(grant, fresh.begin().number());
      fresh.tell(
          new InstrumentEvent.NotBegun(
              grant, new Fault(FaultKind.STARTED_TOO_LATE, "it came too late")));
    }
    assertEquals(List.of(1L, 2L, 3L), fresh.voided());
    assertEquals(JobState.FAILED, fresh.job("survey").state());
    assertEquals(0, fresh.upperCoulombs());
  }

  @Test
  void readBackConditionsThatDifferStopTheNight() {
    Steps fresh = Steps.online(Lab.map("survey"));
    Doing.Preparing asked = (Doing.Preparing) fresh.state().doing();
    fresh.tell(
        new InstrumentEvent.Prepared(
            asked.request(), asked.conditions(), asked.stage().plus(5e-6, 0)));
    assertTrue(fresh.books().stopped().isPresent());
    assertEquals(0, fresh.entries(Entry.GrantOpened.class).size());
    assertEquals(List.of(), Commands.of(Command.Prepare.class, fresh.later(Duration.ZERO).wake()));
  }
}
