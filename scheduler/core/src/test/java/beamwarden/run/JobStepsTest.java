package beamwarden.run;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.instrument.FaultKind;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.ledger.Entry;
import beamwarden.quantity.Charge;
import beamwarden.quantity.Current;
import beamwarden.quantity.Fluence;
import beamwarden.quantity.Length;
import beamwarden.queue.AtCap;
import beamwarden.queue.Averaging;
import beamwarden.queue.Cap;
import beamwarden.queue.HeldFor;
import beamwarden.queue.JobState;
import beamwarden.queue.Sample;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Which job comes next, and what a cap or a predecessor makes of it. */
class JobStepsTest {
  @Nested
  class TheOrderOfJobs {
    @Test
    void theHigherPriorityComesFirst() {
      Steps steps = Steps.online(Lab.map("survey").priority(3), Lab.map("close-up").priority(7));
      assertEquals("close-up", steps.begin().exposure().job());
    }

    @Test
    void ofEqualOnesTheFirstHandedInComesFirst() {
      Steps steps = Steps.online(Lab.map("survey"), Lab.map("close-up"));
      assertEquals("survey", steps.begin().exposure().job());
    }

    @Test
    void aJobThatRunsIsNotInterruptedByAHigherPriority() {
      Steps steps = Steps.exposing(Lab.map("survey").priority(3));
      steps.submit(Lab.sample(), Lab.map("close-up").priority(9));
      steps.ends(1);
      steps.begins(2).ends(2);
      assertEquals("survey", steps.opened(3).exposure().job());
      steps.begins(3).ends(3);
      assertEquals("close-up", steps.opened(4).exposure().job());
    }
  }

  @Nested
  class AJobThatComesAfterAnother {
    private final Steps steps =
        Steps.online(Lab.map("close-up").priority(9).after("survey"), Lab.map("survey"));

    @Test
    void waitsUntilTheOtherIsDone() {
      steps.exposes().ends(1);
      steps.begins(2).ends(2);
      assertEquals(JobState.WAITING, steps.job("close-up").state());
      steps.begins(3).ends(3);
      assertEquals(JobState.DONE, steps.job("survey").state());
      assertEquals("close-up", steps.opened(4).exposure().job());
    }

    @Test
    void isHeldWithTheReasonWhenTheOtherEndedUndone() {
      surveyFails();
      assertEquals(Optional.of(HeldFor.PREDECESSOR), steps.job("close-up").heldFor());
      assertEquals("survey, which must come before it, is failed", steps.job("close-up").because());
    }

    @Test
    void isHeldWhenTheOtherIsWithdrawn() {
      steps.begin();
      steps.ask(new Event.Wish.Withdraw(List.of("survey")));
      steps.tell(
          new InstrumentEvent.NotBegun(1, steps.fault(FaultKind.STARTED_TOO_LATE).orElseThrow()));
      assertEquals(
          "survey, which must come before it, is withdrawn", steps.job("close-up").because());
    }

    @Test
    void goesOnAllTheSameWhenAPersonReleasesIt() {
      surveyFails();
      assertEquals(Optional.empty(), steps.ask(new Event.Wish.Release(List.of("close-up"), false)));
      steps.tell(new InstrumentEvent.WoundDown(Steps.parked()));
      assertEquals("close-up", steps.begin().exposure().job());
    }

    private void surveyFails() {
      steps.exposes().later(Lab.LINE);
      steps.tell(
          new InstrumentEvent.Ended(
              steps.receipt(1, 1, Lab.LINE, steps.fault(FaultKind.REGION_UNREACHABLE))));
    }

    @Test
    void goesOnAfterAnotherThatWasShortened() {
      Sample tight = Lab.sample(Lab.charge(1.5 * Lab.UPPER_COULOMBS));
      Steps cut =
          Steps.online(
                  tight,
                  Lab.map("survey").atCap(AtCap.TRIM),
                  Lab.count("pairs", 1).after("survey").atCap(AtCap.ASK))
              .exposes();
      cut.ends(1);
      cut.begins(2).ends(2);
      assertEquals(JobState.SHORTENED, cut.job("survey").state());
      assertEquals(Optional.of(HeldFor.APPROVAL), cut.job("pairs").heldFor());
    }
  }

  @Nested
  class ACapThatLeavesNoRoom {
    private Steps tight(AtCap atCap, double exposures) {
      Sample sample = Lab.sample(Lab.charge(exposures * Lab.UPPER_COULOMBS));
      return Steps.online(sample, Lab.map("survey").atCap(atCap));
    }

    @Test
    void refusesAJobThatCouldNotEndBeforeItBegins() {
      Steps steps = tight(AtCap.REFUSE, 2.99);
      assertEquals(JobState.REFUSED, steps.job("survey").state());
      assertEquals(0, steps.books().lastGrant());
      assertTrue(
          steps.job("survey").because().startsWith("job survey would bring the charge to "),
          steps.job("survey").because());
    }

    @Test
    void admitsAJobThatFitsExactly() {
      Steps steps = tight(AtCap.REFUSE, 3.000001).exposes();
      steps.ends(1);
      steps.begins(2).ends(2);
      steps.begins(3).ends(3);
      assertEquals(JobState.DONE, steps.job("survey").state());
    }

    @Test
    void cutsAJobThatWantsToBeCutToWhatFits() {
      Steps steps = tight(AtCap.TRIM, 1.501).exposes();
      assertEquals(45, steps.entries(Entry.JobTrimmed.class).get(0).to().unitsPerPass());
      steps.ends(1);
      steps.begins(2).ends(2);
      assertEquals(JobState.SHORTENED, steps.job("survey").state());
      assertTrue(steps.job("survey").because().startsWith("cut to what fits: job survey would"));
      assertEquals(1.5 * Lab.UPPER_COULOMBS, steps.upperCoulombs(), 1e-15);
    }

    @Test
    void refusesAJobOfWhichNotEvenALineFits() {
      Steps steps = tight(AtCap.TRIM, 0.01);
      assertEquals(JobState.REFUSED, steps.job("survey").state());
    }

    @ParameterizedTest
    @CsvSource({"REFUSE, REFUSED", "ASK, HELD", "TRIM, SHORTENED"})
    void endsAJobAsItWishesWhenTheCurrentTurnsOutHigher(AtCap atCap, JobState end) {
      Steps steps = tight(atCap, 3.000001);
      steps.untilMeasuring();
      steps.tell(steps.measured(new Current(110e-12)));
      steps.begins(1).ends(1);
      steps.begins(2).ends(2);
      assertEquals(end, steps.job("survey").state());
      assertEquals(2 * 1.1 * Lab.UPPER_COULOMBS, steps.upperCoulombs(), 1e-15);
    }

    @Test
    void onlyBecauseOfAnOpenGrantWaitsForItsReceipt() {
      Steps steps = Steps.online(Lab.map("survey"));
      steps.begin();
      steps.submit(Lab.sample(Lab.charge(1.5 * Lab.UPPER_COULOMBS)));
      assertEquals(List.of(), Commands.stored(steps.tell(new InstrumentEvent.Begun(1))));
      assertEquals(JobState.RUNNING, steps.job("survey").state());
      steps.later(Lab.LINE);
      List<Command> commands =
          steps.tell(new InstrumentEvent.Ended(steps.receipt(1, 1, Lab.LINE, Optional.empty())));
      assertEquals(2, Commands.only(Command.Begin.class, commands).grant().number());
    }
  }

  @Nested
  class AJobThatAsksWhenACapBinds {
    private static final double LIMIT = 2 * Lab.UPPER_COULOMBS;

    private final Cap fluence =
        new Cap.OnFluence(
            new Fluence(1e12),
            new Averaging.OverLength(new Length(2e-7)),
            Optional.empty(),
            "does not bind");
    private final Steps steps =
        Steps.online(Lab.sample(fluence, Lab.charge(LIMIT)), Lab.map("survey").atCap(AtCap.ASK));

    @Test
    void isHeldUntilApprovedAndReleaseAloneDoesNotPassIt() {
      assertEquals(Optional.of(HeldFor.APPROVAL), steps.job("survey").heldFor());
      Optional<String> refusal = steps.ask(new Event.Wish.Release(List.of("survey"), true));
      assertTrue(refusal.orElseThrow().startsWith("survey needs approve: "), refusal.toString());
      assertEquals(Optional.of(HeldFor.APPROVAL), steps.job("survey").heldFor());
    }

    @Test
    void isLetGoByRaisingTheCapThatBindsJustEnoughAndNoOther() {
      assertEquals(
          Optional.empty(), steps.ask(new Event.Wish.Approve("survey", "the owner agreed")));
      List<Cap> caps = steps.books().sample("sst-07").orElseThrow().sample().caps();
      assertEquals(fluence, caps.get(0));
      double raised = ((Cap.OnCharge) caps.get(1)).limit().coulombs();
      assertEquals(3 * Lab.UPPER_COULOMBS, raised, 1e-8 * raised);
    }

    @Test
    void leavesTheApprovalAndTheRaisedCapInTheBooksWithTheReason() {
      steps.ask(new Event.Wish.Approve("survey", "the owner agreed"));
      assertEquals(
          new Entry.Approved("survey", "the owner agreed"), steps.lastEntry(Entry.Approved.class));
      assertEquals("the owner agreed", steps.lastEntry(Entry.SampleDeclared.class).because());
    }

    @Test
    void isThenDoneInFull() {
      steps.ask(new Event.Wish.Approve("survey", "the owner agreed"));
      steps.tell(new InstrumentEvent.WoundDown(Steps.parked()));
      steps.exposes().ends(1);
      steps.begins(2).ends(2);
      steps.begins(3).ends(3);
      assertEquals(JobState.DONE, steps.job("survey").state());
    }

    @Test
    void isNotLetGoWithoutAReason() {
      assertEquals(
          Optional.of("an approval needs a reason; give it with --reason"),
          steps.ask(new Event.Wish.Approve("survey", "")));
      assertEquals(
          new Cap.OnCharge(new Charge(LIMIT), Optional.empty(), ""),
          steps.books().sample("sst-07").orElseThrow().sample().caps().get(1));
    }
  }
}
