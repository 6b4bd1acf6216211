package beamwarden.run;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.Rectangle;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.StopWhen;
import beamwarden.ledger.Entry;
import beamwarden.queue.Area;
import beamwarden.queue.Cap;
import beamwarden.queue.HeldFor;
import beamwarden.queue.JobState;
import beamwarden.queue.Queue;
import beamwarden.queue.Sample;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Stream;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** What people ask of a run. */
class WishStepsTest {
  private static final long NUMBER = 4711;

  @Nested
  class AnAnswerComesOnlyOnceItIsOnDisk {
    static Stream<Event.Wish> wishes() {
      Queue late = new Queue("late", List.of(Lab.sample()), List.of(Lab.map("late").job()));
      return Stream.of(
          new Event.Wish.Submit(late, "hash"),
          new Event.Wish.Hold(List.of("survey")),
          new Event.Wish.Release(List.of("held"), false),
          new Event.Wish.Withdraw(List.of("survey")),
          new Event.Wish.Stop(StopWhen.AT_BOUNDARY));
    }

    private final Steps steps = Steps.exposing(Lab.map("survey"), Lab.map("held"));

    @ParameterizedTest
    @MethodSource("wishes")
    void whatIsDoneIsAnsweredByTheStepThatLearnsOfTheCommit(Event.Wish wish) {
      steps.ask(new Event.Wish.Hold(List.of("held")));
      List<Command> asked = steps.step(new Event.Asked(NUMBER, wish));
      assertEquals(List.of("Commit"), Commands.kinds(asked));
      List<Command> stored = steps.step(steps.store(Commands.only(Command.Commit.class, asked)));
      assertEquals(
          new Command.Answer(NUMBER, Optional.empty()),
          Commands.only(Command.Answer.class, stored));
    }

    @ParameterizedTest
    @MethodSource("wishes")
    void whatCouldNotBeStoredIsAnsweredWithTheReason(Event.Wish wish) {
      steps.ask(new Event.Wish.Hold(List.of("held")));
      steps.step(new Event.Asked(NUMBER, wish));
      List<Command> failed = steps.step(new Event.CommitFailed("the disk is full"));
      assertEquals(
          new Command.Answer(NUMBER, Optional.of("the disk is full")),
          Commands.only(Command.Answer.class, failed));
    }
  }

  @Nested
  class WhatCannotBeDoneIsRefusedAndLeavesNoTrace {
    private final Steps steps = Steps.exposing(Lab.map("survey"));

    private void assertRefused(String sentence, Event.Wish wish) {
      List<Command> commands = steps.step(new Event.Asked(NUMBER, wish));
      assertEquals(List.of(new Command.Answer(NUMBER, Optional.of(sentence))), commands);
    }

    @Test
    void aJobThatNobodyKnows() {
      assertRefused(
          "there is no job nowhere; watch lists them",
          new Event.Wish.Hold(List.of("survey", "nowhere")));
    }

    @Test
    void aJobThatHasEnded() {
      steps.ask(new Event.Wish.Withdraw(List.of("survey")));
      assertRefused("survey is withdrawn already", new Event.Wish.Release(List.of("survey"), true));
    }

    @Test
    void aJobIdThatIsUsed() {
      Queue again = new Queue("again", List.of(Lab.sample()), List.of(Lab.map("survey").job()));
      assertRefused(
          "the store already has survey; a job id is used once, give the new jobs other ids",
          new Event.Wish.Submit(again, "hash"));
    }

    @Test
    void anApprovalOfNothing() {
      assertRefused(
          "there is nothing called tuesday to approve; name a job, a sample, placements or"
              + " hand-over",
          new Event.Wish.Approve("tuesday", "because"));
      assertRefused(
          "survey does not wait for an approval", new Event.Wish.Approve("survey", "because"));
      assertRefused(
          "no change of sample sst-07 waits to be approved",
          new Event.Wish.Approve("sst-07", "because"));
    }
  }

  @Nested
  class JobsAndTheNight {
    private final Steps steps = Steps.online(Lab.map("survey"), Lab.map("close-up"));

    @Test
    void aHeldJobIsPassedOverUntilItIsReleased() {
      steps.ask(new Event.Wish.Hold(List.of("survey")));
      assertEquals("close-up", steps.begin().exposure().job());
      steps.begins(1);
      steps.ask(new Event.Wish.Release(List.of("survey"), false));
      assertEquals(JobState.WAITING, steps.job("survey").state());
    }

    @Test
    void aWithdrawnJobNeverRunsAgain() {
      steps.ask(new Event.Wish.Withdraw(List.of("survey")));
      assertEquals(JobState.WITHDRAWN, steps.job("survey").state());
      assertEquals("close-up", steps.begin().exposure().job());
    }

    @Test
    void aStoppedNightStaysStoppedUntilAllOfItIsReleased() {
      steps.ask(new Event.Wish.Stop(StopWhen.NOW));
      steps.ask(new Event.Wish.Release(List.of("survey"), false));
      assertTrue(steps.books().stopped().isPresent());
      steps.ask(new Event.Wish.Release(List.of(), true));
      assertEquals(Optional.empty(), steps.books().stopped());
    }

    @Test
    void aStopOutlivesADaemonsRestart() {
      steps.ask(new Event.Wish.Stop(StopWhen.NOW));
      Steps next = steps.restarted();
      next.wake();
      next.tell(Steps.connected("first"));
      next.sealed(Map.of());
      assertTrue(next.state().doing() instanceof Doing.WindingDown);
      next.tell(new InstrumentEvent.WoundDown(Steps.parked()));
      assertEquals(List.of(), next.wake());
    }
  }

  @Nested
  class ASampleThatIsHandedInAgain {
    private static final double LIMIT = 10 * Lab.UPPER_COULOMBS;

    private final Steps steps = Steps.online(Lab.sample(Lab.charge(LIMIT)), Lab.map("survey"));

    private Sample now() {
      return steps.books().sample("sst-07").orElseThrow().sample();
    }

    private void assertHeldForApproval(String job) {
      assertEquals(JobState.HELD, steps.job(job).state());
      assertEquals(Optional.of(HeldFor.APPROVAL), steps.job(job).heldFor());
      assertEquals(
          "its queue loosens what holds for sample sst-07; approve sst-07 to take that over",
          steps.job(job).because());
    }

    @Test
    void withALowerCapIsTakenOverAtOnce() {
      Sample tighter = Lab.sample(Lab.charge(LIMIT / 2));
      steps.submit(tighter, Lab.map("close-up"));
      assertEquals(tighter, now());
      assertEquals(JobState.WAITING, steps.job("close-up").state());
    }

    @Test
    void withAHigherCapHoldsItsJobsAndTheLowerCapStays() {
      steps.submit(Lab.sample(Lab.charge(LIMIT * 2)), Lab.map("close-up"));
      assertHeldForApproval("close-up");
      assertEquals(Lab.sample(Lab.charge(LIMIT)), now());
      assertEquals(JobState.WAITING, steps.job("survey").state());
    }

    @Test
    void withAHigherCapIsTakenOverWhenApproved() {
      Sample looser = Lab.sample(Lab.charge(LIMIT * 2));
      steps.submit(looser, Lab.map("close-up"));
      assertEquals(
          Optional.of("its queue changes sample sst-07; approve that sample"),
          steps.ask(new Event.Wish.Approve("close-up", "because")));
      assertEquals(
          Optional.empty(), steps.ask(new Event.Wish.Approve("sst-07", "the owner agreed")));
      assertEquals(looser, now());
      assertEquals(JobState.WAITING, steps.job("close-up").state());
      assertEquals(
          new Entry.SampleDeclared(looser, "the owner agreed"),
          steps.lastEntry(Entry.SampleDeclared.class));
    }

    @Test
    void withoutItsCapHoldsItsJobs() {
      steps.submit(Lab.sample(), Lab.map("close-up"));
      assertHeldForApproval("close-up");
      assertEquals(1, now().caps().size());
    }

    @Test
    void atAnotherPlaceHoldsItsJobs() {
      Sample known = now();
      Placement elsewhere = new Placement(new Point(0.005, 0), 0, 0);
      steps.submit(
          new Sample(
              known.id(), known.label(), known.material(), elsewhere, known.areas(), known.caps()),
          Lab.map("close-up"));
      assertHeldForApproval("close-up");
      assertEquals(known.placement(), now().placement());
    }

    @Test
    void withANewKeepOutAreaAndAHigherCapTakesOverOnlyTheArea() {
      Sample known = now();
      Area keepOut =
          new Area("isotopes", Rectangle.of(new Point(1e-3, 0), 1e-6, 1e-6), Area.Use.KEEP_OUT);
      List<Cap> higher = List.of(Lab.charge(LIMIT * 2));
      steps.submit(
          new Sample(
              known.id(),
              known.label(),
              known.material(),
              known.placement(),
              List.of(keepOut),
              higher),
          Lab.map("close-up"));
      assertHeldForApproval("close-up");
      assertEquals(List.of(keepOut), now().areas());
      assertEquals(known.caps(), now().caps());
    }
  }
}
