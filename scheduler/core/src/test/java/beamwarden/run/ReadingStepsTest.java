package beamwarden.run;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.BeamSettings;
import beamwarden.instrument.CurrentReading;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.StopWhen;
import beamwarden.ledger.Entry;
import beamwarden.quantity.Current;
import beamwarden.quantity.Voltage;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;

/** A grant rests on a reading of the current that holds until it ends. */
class ReadingStepsTest {
  /** Readings within 13 % of the wish are allowed: 10 % of drift and 3 % of tolerance. */
  private static final Current HIGHEST_ALLOWED = new Current(112.9e-12);

  private static final Current TOO_HIGH = new Current(114e-12);
  private static final Current TOO_LOW = new Current(86e-12);

  private final Steps steps = Steps.online(Lab.map("survey"), Lab.map("close-up"));

  private List<Command> reads(Current current) {
    return steps.tell(steps.measured(current));
  }

  @Nested
  class BeforeTheFirstGrant {
    @Test
    void theInstrumentIsPreparedThenItsCurrentMeasuredThenAGrantStored() {
      steps.untilMeasuring();
      List<Command> commands = reads(Lab.BEAM.current());
      assertEquals(
          List.of("CurrentMeasured", "JobChanged", "GrantOpened"), Commands.stored(commands));
      assertEquals(List.of("Commit", "Commit", "Begin"), Commands.kinds(commands));
    }

    @Test
    void aHigherReadingThanWishedIsWhatTheGrantCountsOn() {
      steps.untilMeasuring();
      reads(new Current(108e-12));
      assertEquals(108e-12 * 1.03 * 1.1, steps.opened(1).inFull().upperCurrent().amperes(), 1e-24);
    }

    @Test
    void aLowerReadingThanWishedCountsAsTheWish() {
      steps.untilMeasuring();
      reads(new Current(92e-12));
      assertEquals(100e-12 * 1.03 * 1.1, steps.opened(1).inFull().upperCurrent().amperes(), 1e-24);
      assertEquals(92e-12, steps.opened(1).inFull().bestCurrent().amperes());
    }

    @Test
    void aReadingOutOfItsBoundsStopsTheNight() {
      steps.untilMeasuring();
      reads(TOO_HIGH);
      assertEquals(
          Optional.of(
              "the probe current reads 114 pA where 100 pA was set: out of its bounds; check the"
                  + " column"),
          steps.books().stopped());
      assertEquals(0, steps.books().lastGrant());
    }

    @Test
    void aReadingThatIsTooLowStopsTheNightToo() {
      steps.untilMeasuring();
      reads(TOO_LOW);
      assertTrue(steps.books().stopped().isPresent());
      assertEquals(0, steps.books().lastGrant());
    }

    @Test
    void aReadingUnderOtherSettingsStopsTheNight() {
      steps.untilMeasuring();
      Doing.Measuring asked = (Doing.Measuring) steps.state().doing();
      BeamSettings other = new BeamSettings(new Voltage(5_000), Lab.BEAM.current());
      steps.tell(
          new InstrumentEvent.Measured(
              asked.request(), new CurrentReading(other, Lab.BEAM.current())));
      assertEquals(
          Optional.of("survey: the current was read under other settings than were set; check it"),
          steps.books().stopped());
    }

    @Test
    void anAnswerToAnEarlierRequestIsNoReading() {
      steps.untilMeasuring();
      Doing.Measuring asked = (Doing.Measuring) steps.state().doing();
      steps.tell(
          new InstrumentEvent.Measured(
              asked.request() - 1, new CurrentReading(Lab.BEAM, Lab.BEAM.current())));
      assertEquals(0, steps.entries(Entry.CurrentMeasured.class).size());
    }
  }

  @Nested
  class AReadingHoldsForAsLongAsTheProfileSays {
    @Test
    void anotherIsTakenBeforeAnExposureThatWouldOutliveIt() {
      Lab.Wanted[] maps =
          IntStream.range(0, 21)
              .mapToObj(each -> Lab.map("map-" + each))
              .toArray(Lab.Wanted[]::new);
      Steps hour = Steps.online(maps).exposes();
      exposeAll(hour);
      assertEquals(Lab.abilities().meter().readingEvery(), Lab.EXPOSURE.multipliedBy(60));
      assertEquals(60, hour.books().lastGrant());
      assertTrue(hour.state().doing() instanceof Doing.Measuring);
      assertEquals(61, hour.begin().number());
    }

    @Test
    void otherSettingsNeedAnotherOne() {
      BeamSettings other = new BeamSettings(new Voltage(5_000), Lab.BEAM.current());
      Steps two = Steps.online(Lab.map("survey"), Lab.map("close-up").beam(other)).exposes();
      exposeAll(two);
      assertEquals(other, ((Doing.Preparing) two.state().doing()).conditions().beam());
      two.untilMeasuring();
      assertEquals(3, two.books().lastGrant());
    }

    @Test
    void afterAWindDownAnotherIsTaken() {
      steps.begin();
      steps.begins(1);
      steps.ask(new Event.Wish.Stop(StopWhen.NOW));
      steps.later(Lab.LINE);
      steps.tell(new InstrumentEvent.Ended(steps.receipt(1, 1, Lab.LINE, Optional.empty())));
      steps.tell(new InstrumentEvent.WoundDown(Steps.parked()));
      steps.ask(new Event.Wish.Release(List.of(), true));
      steps.untilMeasuring();
      assertEquals(1, steps.entries(Entry.CurrentMeasured.class).size());
    }
  }

  /** Lets every exposure take the time it takes, until something else is asked for. */
  private static void exposeAll(Steps steps) {
    while (steps.state().current().isPresent()) {
      long grant = steps.state().current().get().grant();
      steps.begins(grant).ends(grant);
    }
  }

  @Nested
  class ALaterReadingThatShowsMore {
    /** Grant 1 was made at the wished current; grant 2 was refused, and all is prepared afresh. */
    private void exposedOnceThenReads(Current current) {
      steps.begin();
      steps.begins(1).ends(1);
      steps.tell(
          new InstrumentEvent.NotBegun(2, steps.fault(FaultKind.STARTED_TOO_LATE).orElseThrow()));
      steps.untilMeasuring();
      reads(current);
    }

    @Test
    void withinItsBoundsLeavesWhatWasBookedOnTheGuarantees() {
      exposedOnceThenReads(HIGHEST_ALLOWED);
      assertEquals(1, steps.entries(Entry.GrantBooked.class).size());
      assertEquals(Optional.empty(), steps.books().stopped());
    }

    @Test
    void outOfItsBoundsRaisesItAndStopsTheNight() {
      exposedOnceThenReads(TOO_HIGH);
      assertEquals(TOO_HIGH.amperes() * 1.03, bookedAmperes(steps, 1), 1e-24);
      assertTrue(steps.books().stopped().isPresent());
    }

    @Test
    void leavesWhatItDoesNotExceed() {
      exposedOnceThenReads(new Current(109e-12));
      assertEquals(1, steps.entries(Entry.GrantBooked.class).size());
    }

    @Test
    void neverLowersWhatIsBooked() {
      exposedOnceThenReads(new Current(90e-12));
      assertEquals(1, steps.entries(Entry.GrantBooked.class).size());
      assertEquals(100e-12 * 1.03 * 1.1, bookedAmperes(steps, 1), 1e-24);
    }

    @Test
    void raisesItThoughOtherSettingsWereReadInBetween() {
      BeamSettings other = new BeamSettings(new Voltage(5_000), Lab.BEAM.current());
      Steps three =
          Steps.online(Lab.map("survey"), Lab.map("close-up").beam(other), Lab.map("survey-again"));
      three.exposes();
      exposeAll(three);
      three.begin();
      exposeAll(three);
      three.untilMeasuring();
      three.tell(three.measured(TOO_HIGH));
      assertEquals(TOO_HIGH.amperes() * 1.03, bookedAmperes(three, 1), 1e-24);
      assertEquals(TOO_HIGH.amperes() * 1.03, bookedAmperes(three, 3), 1e-24);
      assertEquals(100e-12 * 1.03 * 1.1, bookedAmperes(three, 4), 1e-24);
    }

    /** The upper current at which a grant is booked now. */
    private static double bookedAmperes(Steps steps, long grant) {
      return steps.entries(Entry.GrantBooked.class).stream()
          .filter(booked -> booked.delivered().grant() == grant)
          .reduce((before, after) -> after)
          .orElseThrow()
          .delivered()
          .upperCurrent()
          .amperes();
    }
  }
}
