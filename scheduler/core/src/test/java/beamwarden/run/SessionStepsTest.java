package beamwarden.run;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.instrument.Fault;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.ledger.Entry;
import beamwarden.queue.HeldFor;
import beamwarden.queue.JobState;
import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;

/** What was touched is not resumed blindly: another chamber session holds every job. */
class SessionStepsTest {
  private final Steps steps = Steps.exposing(Lab.map("survey"), Lab.map("close-up"));

  /** The connection comes back, and tells of a chamber session. */
  private void comesBackIn(String session) {
    steps.tell(new InstrumentEvent.Lost("the cable is out"));
    steps.later(steps.setup().waits().reconnectAfter()).wake();
    steps.tell(Steps.connected(session));
    steps.sealed(Map.of(1L, new GrantFate.NeverBegun(), 2L, new GrantFate.NeverBegun()));
  }

  private Optional<String> approvePlacements() {
    return steps.ask(new Event.Wish.Approve(Entry.Approved.PLACEMENTS, "looked, all in place"));
  }

  private void assertHeldForPlacements(String job) {
    assertEquals(JobState.HELD, steps.job(job).state(), job);
    assertEquals(Optional.of(HeldFor.PLACEMENTS), steps.job(job).heldFor(), job);
  }

  @Test
  void anAdapterThatOnlyRestartedReadsTheSameSessionBackAndTheNightGoesOn() {
    comesBackIn("first");
    assertEquals(Optional.empty(), steps.books().unconfirmedSession());
    assertEquals(3, steps.begin().number());
  }

  @Test
  void anotherSessionHoldsEveryJobUntilPlacementsAreConfirmed() {
    comesBackIn("second");
    assertHeldForPlacements("survey");
    assertHeldForPlacements("close-up");
    assertTrue(steps.state().doing() instanceof Doing.WindingDown);
    assertEquals(Optional.empty(), approvePlacements());
    assertEquals("second", steps.begin().session());
  }

  @Test
  void releasingDoesNotConfirmPlacements() {
    comesBackIn("second");
    assertEquals(
        Optional.of(
            "survey needs approve: the chamber was opened, vented or re-homed; confirm holder and"
                + " placements with approve placements"),
        steps.ask(new Event.Wish.Release(List.of("survey"), true)));
    assertHeldForPlacements("survey");
  }

  @Test
  void aJobThatAPersonHeldBeforeIsNotLetGoByAReleaseAlone() {
    steps.ask(new Event.Wish.Hold(List.of("survey", "close-up")));
    comesBackIn("second");
    assertEquals(
        Optional.of(
            "survey needs approve: the chamber was opened, vented or re-homed; confirm holder and"
                + " placements with approve placements"),
        steps.ask(new Event.Wish.Release(List.of("survey"), false)));
    assertHeldForPlacements("survey");
    assertEquals(Optional.of(HeldFor.A_PERSON), steps.job("close-up").heldFor());
  }

  @Test
  void aJobThatIsHandedInMeanwhileIsHeldToo() {
    comesBackIn("second");
    steps.submit(Lab.sample(), Lab.map("late"));
    assertHeldForPlacements("late");
    approvePlacements();
    assertEquals(JobState.WAITING, steps.job("late").state());
  }

  @Test
  void aThirdSessionAsksForConfirmationOnceMore() {
    comesBackIn("second");
    approvePlacements();
    comesBackIn("third");
    assertHeldForPlacements("survey");
    assertEquals(Optional.of("third"), steps.books().unconfirmedSession());
  }

  @Test
  void anApprovalWithoutAReasonOrWithoutNeedIsRefused() {
    assertEquals(Optional.of("no placement waits to be confirmed"), approvePlacements());
    comesBackIn("second");
    assertEquals(
        Optional.of("an approval needs a reason; give it with --reason"),
        steps.ask(new Event.Wish.Approve(Entry.Approved.PLACEMENTS, " ")));
    assertHeldForPlacements("survey");
  }

  @Nested
  class AFaultThatStopsTheNightPutsTheSessionInDoubt {
    private final InstrumentEvent.Trouble doorOpened =
        new InstrumentEvent.Trouble(new Fault(FaultKind.INTERLOCK, "the door was opened"));

    @Test
    void theInstrumentIsAskedForItAtOnceWhenNothingExposes() {
      Steps idle = Steps.online();
      idle.tell(new InstrumentEvent.WoundDown(Steps.parked()));
      assertEquals(List.of("Commit", "Connect"), Commands.kinds(idle.tell(doorOpened)));
    }

    @Test
    void anExposureComesToItsEndFirst() {
      assertEquals(List.of(), Commands.of(Command.Connect.class, steps.tell(doorOpened)));
      List<Command> commands =
          steps.tell(
              new InstrumentEvent.Ended(
                  steps.receipt(1, 0, Duration.ZERO, steps.fault(FaultKind.INTERLOCK))));
      assertEquals(1, Commands.of(Command.Connect.class, commands).size());
    }

    @Test
    void aGrantRefusedBecauseOfTheSessionAsksForItToo() {
      Steps fresh = Steps.online(Lab.map("survey"));
      fresh.begin();
      List<Command> commands =
          fresh.tell(
              new InstrumentEvent.NotBegun(
                  1, new Fault(FaultKind.READINGS_DISAGREE, "this is another session")));
      assertEquals(1, Commands.of(Command.Connect.class, commands).size());
    }

    @Test
    void anotherSessionThenHoldsEveryJobWhoeverReleasesTheNight() {
      asksAfterTheDoorAndIsTold("second");
      assertHeldForPlacements("survey");
      assertHeldForPlacements("close-up");
      steps.ask(new Event.Wish.Release(List.of(), true));
      assertHeldForPlacements("survey");
      approvePlacements();
      assertEquals("second", steps.begin().session());
    }

    @Test
    void theSameSessionLeavesItAtTheStop() {
      asksAfterTheDoorAndIsTold("first");
      assertEquals(Optional.of("the door was opened"), steps.books().stopped());
      assertEquals(Optional.empty(), steps.books().unconfirmedSession());
      steps.ask(new Event.Wish.Release(List.of(), true));
      assertEquals("first", steps.begin().session());
    }

    private void asksAfterTheDoorAndIsTold(String session) {
      steps.tell(doorOpened);
      steps.tell(new InstrumentEvent.Ended(steps.receipt(1, 0, Duration.ZERO, Optional.empty())));
      steps.tell(Steps.connected(session));
      steps.sealed(Map.of());
      steps.tell(new InstrumentEvent.WoundDown(Steps.parked()));
    }

    @Test
    void aHeartbeatSeenBeforeIsNoneOfTheNewConnection() {
      steps.tell(doorOpened);
      steps.tell(new InstrumentEvent.Ended(steps.receipt(1, 0, Duration.ZERO, Optional.empty())));
      steps.tell(new InstrumentEvent.HeartbeatSeen(17));
      assertEquals(Beat.NONE, steps.state().beat());
    }
  }
}
