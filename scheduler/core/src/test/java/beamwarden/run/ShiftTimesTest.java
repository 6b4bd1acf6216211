package beamwarden.run;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.RasterScan;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.Readings;
import beamwarden.ledger.Entry;
import beamwarden.queue.JobState;
import java.time.Duration;
import java.time.Instant;
import java.time.LocalTime;
import java.time.ZoneOffset;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;

/** When a job may be exposed: shifts and their limits, its own times, and a clock that lies. */
class ShiftTimesTest {
  /** Lets every exposure take the time it takes, until nothing is left and it is parked. */
  private static void exposeAll(Steps steps) {
    while (steps.state().current().isPresent()) {
      long grant = steps.state().current().get().grant();
      steps.begins(grant).ends(grant);
    }
    steps.tell(new InstrumentEvent.WoundDown(Steps.parked()));
  }

  /** When the last exposure ended. */
  private static Instant lastEnd(Steps steps) {
    return steps.now();
  }

  @Nested
  class NoExposureStartsAfterTheLatestStart {
    private Steps upTo(Instant latestStart) {
      LocalTime local = latestStart.atOffset(ZoneOffset.UTC).toLocalTime();
      RunSetup setup = Lab.setup(Lab.night(Optional.of(local), Optional.empty()));
      return Steps.begun(setup, Lab.EVENING).goesOnline(Lab.sample(), Lab.map("survey")).exposes();
    }

    @Test
    void oneThatWouldStartLaterIsNotEvenStoredAhead() {
      Steps steps = upTo(Lab.EVENING.plus(Lab.EXPOSURE).minusSeconds(1));
      assertEquals(1, steps.books().lastGrant());
      exposeAll(steps);
      assertEquals(1, steps.books().lastGrant());
    }

    @Test
    void oneThatStartsJustInTimeIsMade() {
      Steps steps = upTo(Lab.EVENING.plus(Lab.EXPOSURE));
      assertEquals(2, steps.books().lastGrant());
      exposeAll(steps);
      assertEquals(2, steps.entries(Entry.GrantBooked.class).size());
    }

    @Test
    void oneThatWasStoredAheadAndBecameLateIsVoided() {
      Steps steps = upTo(Lab.EVENING.plus(Lab.EXPOSURE));
      steps.later(Lab.EXPOSURE.plusSeconds(1));
      steps.tell(new InstrumentEvent.Ended(steps.whole(1)));
      assertEquals(List.of(2L), steps.voided());
    }

    @Test
    void theInstrumentIsToldNotToStartLater() {
      Instant latest = Lab.EVENING.plus(Lab.EXPOSURE).plusSeconds(4);
      Steps steps = upTo(latest);
      Instant seen = steps.passes(Lab.EXPOSURE).state().beat().seenAt();
      List<Command> commands = steps.tell(new InstrumentEvent.Ended(steps.whole(1)));
      assertEquals(
          Duration.between(seen, latest),
          Commands.only(Command.Begin.class, commands).grant().latestStart());
    }
  }

  @Nested
  class TheBeamIsOnNoLongerThanTheShiftsBudget {
    private Steps with(Duration budget) {
      RunSetup setup = Lab.setup(Lab.night(Optional.empty(), Optional.of(budget)));
      return Steps.begun(setup, Lab.EVENING).goesOnline(Lab.sample(), Lab.map("survey")).exposes();
    }

    @Test
    void theLastExposureIsCutToWhatIsLeftOfIt() {
      Steps steps = with(Lab.EXPOSURE.plus(Lab.LINE.multipliedBy(7)));
      exposeAll(steps);
      assertEquals(37, steps.job("survey").done().units(0));
      assertEquals(Lab.EXPOSURE.plus(Lab.LINE.multipliedBy(7)), steps.books().beamOnThisShift());
    }

    @Test
    void theNextShiftHasABudgetOfItsOwn() {
      Steps steps = with(Lab.EXPOSURE);
      exposeAll(steps);
      assertEquals(30, steps.job("survey").done().units(0));
      steps.at(Lab.EVENING.plus(Duration.ofDays(1))).begin();
      assertEquals(Duration.ZERO, steps.books().beamOnThisShift());
    }
  }

  @Nested
  class AJobKeepsItsOwnTimes {
    @Test
    void itDoesNotBeginBeforeItsTime() {
      Instant earliest = Lab.EVENING.plus(Duration.ofMinutes(20));
      Steps steps = Steps.online(Lab.map("survey").notBefore(earliest));
      steps.tell(new InstrumentEvent.WoundDown(Steps.parked()));
      assertTrue(
          steps.at(earliest.minusSeconds(1)).wake().stream()
              .noneMatch(Command.Prepare.class::isInstance));
      assertEquals("survey", steps.at(earliest).begin().exposure().job());
    }

    @Test
    void noneOfItsExposuresEndsAfterItsDeadline() {
      Instant deadline = Lab.EVENING.plus(Lab.EXPOSURE).plus(Lab.LINE.multipliedBy(7));
      Steps steps = Steps.online(Lab.map("survey").until(deadline)).exposes();
      exposeAll(steps);
      assertEquals(37, steps.job("survey").done().units(0));
      assertFalse(lastEnd(steps).isAfter(deadline));
    }

    @Test
    void aPartDoneByItsDeadlineLeavesItShortened() {
      Instant deadline = Lab.EVENING.plus(Lab.EXPOSURE);
      Steps steps = Steps.online(Lab.map("survey").until(deadline)).exposes();
      exposeAll(steps);
      steps.at(deadline.plusMillis(1)).wake();
      assertEquals(JobState.SHORTENED, steps.job("survey").state());
      assertEquals("its deadline passed", steps.job("survey").because());
    }

    @Test
    void nothingDoneByItsDeadlineLeavesItFailed() {
      Instant deadline = Lab.EVENING.plusSeconds(1);
      Steps steps = Steps.online(Lab.map("survey").until(deadline));
      steps.tell(new InstrumentEvent.WoundDown(Steps.parked()));
      steps.at(deadline.plusMillis(1)).wake();
      assertEquals(JobState.FAILED, steps.job("survey").state());
    }
  }

  @Nested
  class BetweenShiftsTheInstrumentStandsBy {
    @Test
    void jobsWaitFromTheCloseOnAndGoOnWhenTheNextShiftOpens() {
      Steps steps =
          Steps.begun(Lab.setup(Lab.night()), Lab.WIND_DOWN.minus(Lab.EXPOSURE.multipliedBy(2)))
              .goesOnline(Lab.sample(), Lab.map("survey"))
              .exposes();
      exposeAll(steps);
      steps.at(Lab.WIND_DOWN.plus(Duration.ofMinutes(10))).wake();
      assertEquals(JobState.WAITING, steps.job("survey").state());
      assertEquals(
          "no shift; the next one opens at 2031-03-13T19:00:00Z", steps.state().standingBy());
      steps.at(Instant.parse("2031-03-13T19:00:00Z"));
      assertEquals(60, ((RasterScan) steps.begin().exposure().scan()).firstRow());
    }

    @Test
    void aShiftThatWindsDownParksTheInstrumentOnce() {
      Steps steps = Steps.begun(Lab.setup(Lab.night()), Lab.WIND_DOWN);
      steps.goesOnline(Lab.sample(), Lab.map("survey"));
      assertTrue(steps.state().doing() instanceof Doing.WindingDown);
      steps.tell(new InstrumentEvent.WoundDown(Steps.parked()));
      assertEquals(
          "beam blanked, column valve closed: the shift winds down",
          steps.lastEntry(Entry.Noted.class).text());
      assertEquals(List.of(), Commands.of(Command.WindDown.class, steps.wake()));
    }

    @Test
    void aWindDownThatIsNotVerifiedStopsTheNight() {
      Steps steps = Steps.begun(Lab.setup(Lab.night()), Lab.WIND_DOWN);
      steps.goesOnline(Lab.sample(), Lab.map("survey"));
      var parked = Steps.parked();
      steps.tell(
          new InstrumentEvent.WoundDown(
              new Readings(true, false, true, Optional.empty(), parked.stage())));
      assertEquals(
          Optional.of(
              "the instrument was wound down, and reads back beam blanked true, valve closed false;"
                  + " see to it"),
          steps.books().stopped());
    }
  }

  @Nested
  class AfterADaemonsRestart {
    private final Steps before = Steps.exposing(Lab.map("survey"));

    @Test
    void theNightGoesOnFromTheLastReceipt() {
      before.ends(1);
      Steps steps = before.later(Duration.ofMinutes(3)).restarted();
      steps.wake();
      steps.tell(Steps.connected("first"));
      steps.sealed(Map.of(2L, new GrantFate.NeverBegun()));
      assertEquals(30, ((RasterScan) steps.begin().exposure().scan()).firstRow());
    }

    @Test
    void aClockBeforeTheLastEntryStandsByAndSaysSo() {
      before.ends(1);
      Steps steps = before.at(before.now().minus(Duration.ofMinutes(10))).restarted();
      steps.wake();
      steps.tell(Steps.connected("first"));
      steps.sealed(Map.of(2L, new GrantFate.NeverBegun()));
      assertEquals(
          "the clock shows 2031-03-12T19:51:00Z, before the last entry of 2031-03-12T20:01:00Z; set"
              + " the clock",
          steps.state().standingBy());
      assertTrue(steps.state().doing() instanceof Doing.WindingDown);
      steps.tell(new InstrumentEvent.WoundDown(Steps.parked()));
      assertEquals(List.of(), Commands.of(Command.Prepare.class, steps.wake()));
      assertEquals("survey", steps.later(Duration.ofMinutes(10)).begin().exposure().job());
    }
  }
}
