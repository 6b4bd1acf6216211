package beamwarden.run;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.instrument.GrantFate;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.ledger.Entry;
import beamwarden.queue.HeldFor;
import beamwarden.queue.JobState;
import java.util.List;
import java.util.Map;
import java.util.Optional;
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
}
