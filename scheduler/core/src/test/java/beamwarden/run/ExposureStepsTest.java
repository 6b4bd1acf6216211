package beamwarden.run;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.instrument.Grant;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.StopWhen;
import beamwarden.ledger.Entry;
import beamwarden.ledger.Recorded;
import beamwarden.queue.JobState;
import java.time.Duration;
import java.time.Instant;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;

/** A grant on its way: what is on disk before what is sent, and what comes of its receipt. */
class ExposureStepsTest {
  @Nested
  class AGrantIsOnDiskBeforeItIsSent {
    private final Steps steps = Steps.online(Lab.map("survey"));

    @Test
    void theStepThatStoresItSendsNothing() {
      List<Command> commands = steps.untilStoring(Entry.GrantOpened.class);
      assertEquals(List.of("Commit"), Commands.kinds(commands));
      assertEquals(List.of("JobChanged", "GrantOpened"), Commands.stored(commands));
    }

    @Test
    void itIsSentInTheStepThatLearnsItIsStored() {
      List<Command> commands = steps.untilStoring(Entry.GrantOpened.class);
      Event.Committed stored = steps.store(Commands.only(Command.Commit.class, commands));
      assertEquals(List.of("Begin"), Commands.kinds(steps.step(stored)));
    }

    @Test
    void itCarriesFenceSessionHeartbeatAndTheHeadOfItsSamplesChain() {
      List<Command> commands = steps.untilStoring(Entry.GrantOpened.class);
      Event.Committed stored = steps.store(Commands.only(Command.Commit.class, commands));
      Grant grant = Commands.only(Command.Begin.class, steps.step(stored)).grant();
      Recorded last = stored.recorded().get(stored.recorded().size() - 1);
      assertEquals(last.hash(), grant.chainHead());
      assertEquals(steps.state().link().fence(), grant.fence());
      assertEquals(Lab.STORE, grant.store());
      assertEquals("first", grant.session());
      assertEquals(steps.state().beat().seen(), grant.heartbeat());
      assertEquals(steps.setup().waits().lease(), grant.lease());
      assertEquals(Lab.EXPOSURE, grant.longestBeamOn());
    }

    @Test
    void itMustStartSoonCountedFromTheHeartbeatsAnswer() {
      steps.untilStoring(Entry.GrantOpened.class);
      Steps slower = Steps.online(Lab.map("survey")).later(Duration.ofSeconds(10));
      assertEquals(
          slower.setup().waits().answerWithin().plusSeconds(10), slower.begin().latestStart());
    }

    @Test
    void whenItCannotBeStoredEverythingStopsAndItIsNeverSent() {
      steps.untilStoring(Entry.GrantOpened.class);
      List<Command> commands = steps.step(new Event.CommitFailed("the disk is full"));
      assertEquals(List.of("StopExposure", "WindDown", "Halt"), Commands.kinds(commands));
      assertEquals(StopWhen.NOW, Commands.only(Command.StopExposure.class, commands).when());
      assertEquals(Optional.of("the disk is full"), steps.state().halted());
      assertEquals(List.of(), steps.later(Duration.ofMinutes(1)).wake());
      assertEquals(
          Optional.of("the disk is full"), steps.ask(new Event.Wish.Release(List.of(), true)));
    }
  }

  @Nested
  class WhileOneExposesTheNextIsStored {
    private final Steps steps = Steps.online(Lab.map("survey"));

    @Test
    void theNextIsStoredWhenTheFirstHasBegunAndIsNotSent() {
      steps.begin();
      List<Command> commands = steps.tell(new InstrumentEvent.Begun(1));
      assertEquals(List.of("Commit"), Commands.kinds(commands));
      assertEquals(List.of("GrantOpened"), Commands.stored(commands));
      assertEquals(Set.of(1L, 2L), steps.books().unresolved().keySet());
    }

    @Test
    void theNextIsSentOnTheReceiptBeforeTheReceiptIsStored() {
      steps.exposes().later(Lab.EXPOSURE);
      List<Command> commands = steps.step(ended(steps, 1));
      assertEquals(List.of("Begin", "Commit"), Commands.kinds(commands));
      assertEquals(2, Commands.only(Command.Begin.class, commands).grant().number());
      assertEquals(List.of("GrantBooked"), Commands.stored(commands));
    }

    @Test
    void aReceiptIsAcknowledgedOnlyOnceItIsStored() {
      steps.exposes().later(Lab.EXPOSURE);
      List<Command> commands = steps.step(ended(steps, 1));
      Event.Committed stored = steps.store(Commands.only(Command.Commit.class, commands));
      List<Command> afterwards = steps.step(stored);
      assertEquals(1, Commands.only(Command.Acknowledge.class, afterwards).grant());
    }

    @Test
    void aReceiptThatCannotBeStoredIsNeverAcknowledged() {
      steps.exposes().later(Lab.EXPOSURE);
      steps.step(ended(steps, 1));
      List<Command> commands = steps.step(new Event.CommitFailed("the disk is full"));
      assertEquals(List.of("StopExposure", "WindDown", "Halt"), Commands.kinds(commands));
    }

    @Test
    void nothingIsStoredAheadThatNeedsOtherConditions() {
      Steps filters = Steps.online(Lab.map("survey", "panchromatic", "red")).exposes();
      filters.ends(1);
      filters.begins(2).ends(2);
      List<Command> commands = filters.tell(new InstrumentEvent.Begun(3));
      assertEquals(List.of(), Commands.stored(commands));
    }

    @Test
    void aWholeMapIsThreeExposuresEachStoredOnce() {
      steps.exposes().ends(1);
      steps.begins(2).ends(2);
      steps.begins(3).ends(3);
      assertEquals(JobState.DONE, steps.job("survey").state());
      assertEquals(3, steps.entries(Entry.GrantBooked.class).size());
      assertEquals(3 * Lab.UPPER_COULOMBS, steps.upperCoulombs(), 1e-15);
    }
  }

  @Nested
  class WhatCouldNoLongerEndInTimeIsVoided {
    /** Exposing a little over so many exposures before the wind-down. */
    private static Steps exposing(int exposures, Duration more) {
      Instant start = Lab.WIND_DOWN.minus(Lab.EXPOSURE.multipliedBy(exposures)).minus(more);
      return Steps.begun(Lab.setup(Lab.night()), start)
          .goesOnline(Lab.sample(), Lab.map("survey"))
          .exposes();
    }

    @Test
    void aGrantStoredAheadWhoseTimeIsOver() {
      Steps steps = exposing(2, Duration.ofSeconds(10));
      assertEquals(2, steps.books().lastGrant());
      steps.later(Lab.EXPOSURE.plusSeconds(11));
      List<Command> commands = steps.tell(new InstrumentEvent.Ended(steps.whole(1)));
      assertEquals(List.of(2L), steps.voided());
      assertTrue(
          Commands.of(Command.Begin.class, commands).stream()
              .allMatch(begin -> begin.grant().number() > 2));
    }

    @Test
    void anExposureThatRunsIntoTheWindDownIsStoppedAtOnce() {
      Steps steps = exposing(2, Duration.ofSeconds(10));
      steps.ends(1);
      steps.begins(2);
      List<Command> commands = steps.at(Lab.WIND_DOWN).wake();
      assertEquals(StopWhen.NOW, Commands.only(Command.StopExposure.class, commands).when());
    }

    @Test
    void whatIsLeftOfTheShiftIsFilledWithAsManyLinesAsFit() {
      Steps steps = exposing(2, Lab.LINE.multipliedBy(10));
      steps.ends(1);
      steps.begins(2).ends(2);
      assertEquals(10, steps.opened(3).exposure().scan().units());
      steps.begins(3).ends(3);
      assertEquals(3, steps.books().lastGrant());
    }
  }

  @Nested
  class AReceiptThatDoesNotComeIsSealedFor {
    private final Steps steps = Steps.exposing(Lab.map("survey"));

    @Test
    void overdueMeansLaterThanTheGrantCouldTake() {
      Duration answer = steps.setup().waits().answerWithin();
      Duration overdue = answer.plus(Lab.EXPOSURE).plus(answer);
      steps.later(overdue.minusMillis(1)).wake();
      assertTrue(steps.state().link().online());
      List<Command> commands = steps.later(Duration.ofMillis(1)).wake();
      Command.Seal seal = Commands.only(Command.Seal.class, commands);
      assertEquals(Set.of(1L, 2L), seal.grants());
      assertEquals(
          "the receipt of grant 1 is overdue; the instrument is sealed",
          steps.lastEntry(Entry.Noted.class).text());
    }

    @Test
    void aReceiptThatComesWhileTheSealIsUnderWayIsLeftToTheSeal() {
      steps.at(steps.state().current().orElseThrow().due()).wake();
      assertEquals(List.of(), steps.tell(new InstrumentEvent.Ended(steps.whole(1))));
      assertEquals(Set.of(1L, 2L), steps.books().unresolved().keySet());
    }
  }

  static Event ended(Steps steps, long grant) {
    return new Event.FromInstrument(new InstrumentEvent.Ended(steps.whole(grant)));
  }
}
