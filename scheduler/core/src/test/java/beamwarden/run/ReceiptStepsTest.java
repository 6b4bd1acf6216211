package beamwarden.run;

import static org.junit.jupiter.api.Assertions.assertEquals;

import beamwarden.instrument.CurrentReading;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.Receipt;
import beamwarden.ledger.Entry;
import beamwarden.quantity.Current;
import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.junit.jupiter.api.Test;

/** A receipt is booked when it can be true; else it is presumed and the night stops. */
class ReceiptStepsTest {
  private static final Duration NONE = Duration.ZERO;

  private final Steps steps = Steps.exposing(Lab.map("survey"));

  @Test
  void whatIsBookedIsWhatWasDeliveredNotWhatWasPlanned() {
    steps.later(Lab.LINE.multipliedBy(12));
    ends(12, Lab.LINE.multipliedBy(12));
    assertEquals(Optional.empty(), steps.books().stopped());
    assertEquals(Lab.UPPER_COULOMBS * 12 / 30, booked(1), 1e-15);
  }

  @Test
  void moreBeamThanTimeHasPassedIsPresumedInFull() {
    steps.later(Lab.EXPOSURE.dividedBy(2));
    ends(30, Lab.EXPOSURE);
    assertPresumed(
        Lab.UPPER_COULOMBS,
        "grant 1: its receipt tells of PT1M of beam after PT30S; the night is stopped, check the"
            + " instrument");
  }

  @Test
  void moreBeamThanGrantedIsPresumedAtTheReceipt() {
    steps.later(Lab.EXPOSURE.multipliedBy(2));
    ends(30, Lab.EXPOSURE.plusSeconds(30));
    assertPresumed(
        Lab.UPPER_COULOMBS * 1.5,
        "grant 1: the receipt of grant 1 says PT1M30S of beam, and PT1M granted; the night is"
            + " stopped, check the instrument");
  }

  @Test
  void moreBeamThanTimeHasPassedAndThanGrantedIsPresumedAtTheReceipt() {
    steps.later(Lab.EXPOSURE);
    ends(30, Lab.EXPOSURE.multipliedBy(3));
    assertPresumed(
        Lab.UPPER_COULOMBS * 3,
        "grant 1: its receipt tells of PT3M of beam after PT1M; the night is stopped, check the"
            + " instrument");
  }

  @Test
  void moreLinesThanGrantedArePresumedInFull() {
    steps.later(Lab.EXPOSURE);
    ends(31, Lab.EXPOSURE);
    assertPresumed(
        Lab.UPPER_COULOMBS,
        "grant 1: the receipt of grant 1 says 31 units touched, and 30 granted; the night is"
            + " stopped, check the instrument");
  }

  @Test
  void lessBeamThanItsLinesTakeIsPresumedInFull() {
    steps.later(Lab.EXPOSURE);
    ends(30, Lab.EXPOSURE.dividedBy(2));
    assertPresumed(
        Lab.UPPER_COULOMBS,
        "grant 1: the receipt of grant 1 says PT30S of beam, and 30 units done, which take PT1M;"
            + " the night is stopped, check the instrument");
  }

  @Test
  void aHigherCurrentThanGrantedIsPresumedAtThatCurrent() {
    steps.later(Lab.EXPOSURE);
    Receipt whole = steps.whole(1);
    CurrentReading seen = new CurrentReading(Lab.BEAM, new Current(150e-12));
    steps.tell(
        new InstrumentEvent.Ended(
            new Receipt(
                1,
                whole.fence(),
                whole.unitsDone(),
                whole.unitsTouched(),
                whole.beamOn(),
                Optional.of(seen),
                Optional.of(seen),
                Map.of(),
                List.of(),
                Optional.empty())));
    assertPresumed(
        Lab.EXPOSURE.toSeconds() * 150e-12 * 1.03,
        "grant 1: the receipt of grant 1 says 150 pA seen, and at most 113.3 pA granted; the night"
            + " is stopped, check the instrument");
  }

  @Test
  void beamWithoutALineTouchedIsPresumedInFull() {
    steps.later(Lab.EXPOSURE);
    ends(0, Lab.LINE);
    assertPresumed(
        Lab.UPPER_COULOMBS,
        "grant 1: the receipt of grant 1 says PT2S of beam, and no unit touched; the night is"
            + " stopped, check the instrument");
  }

  @Test
  void nothingTouchedInNoTimeIsBookedAsNothing() {
    ends(0, NONE);
    assertEquals(Optional.empty(), steps.books().stopped());
    assertEquals(0, booked(1));
  }

  @Test
  void aReceiptThatIsNotBelievedIsKeptWithWhatIsPresumedAndThenAcknowledged() {
    steps.later(Lab.EXPOSURE);
    List<Command> commands = ends(31, Lab.EXPOSURE);
    assertEquals(1, Commands.only(Command.Acknowledge.class, commands).grant());
    Receipt kept = steps.lastEntry(Entry.GrantPresumed.class).receipt().orElseThrow();
    assertEquals(31, kept.unitsTouched());
  }

  @Test
  void aGrantThatHasBegunIsNotVoidBecauseItIsSaidNotToHave() {
    steps.tell(
        new InstrumentEvent.NotBegun(1, steps.fault(FaultKind.STARTED_TOO_LATE).orElseThrow()));
    assertPresumed(
        Lab.UPPER_COULOMBS,
        "grant 1 was said to have begun, and then not to have; the night is stopped, check the"
            + " instrument");
  }

  @Test
  void theSameReceiptTwiceIsBookedOnce() {
    steps.ends(1);
    double booked = steps.upperCoulombs();
    steps.tell(new InstrumentEvent.Ended(steps.whole(1)));
    assertEquals(1, steps.entries(Entry.GrantBooked.class).size());
    assertEquals(booked, steps.upperCoulombs());
  }

  private List<Command> ends(long lines, Duration beamOn) {
    return steps.tell(new InstrumentEvent.Ended(steps.receipt(1, lines, beamOn, Optional.empty())));
  }

  private double booked(long grant) {
    return steps.entries(Entry.GrantBooked.class).stream()
        .map(Entry.GrantBooked::delivered)
        .filter(delivered -> delivered.grant() == grant)
        .mapToDouble(
            delivered -> delivered.upperCurrent().chargeIn(delivered.upperBeamOn()).coulombs())
        .sum();
  }

  private void assertPresumed(double upperCoulombs, String stoppedBecause) {
    assertEquals(Optional.of(stoppedBecause), steps.books().stopped());
    assertEquals(upperCoulombs, steps.upperCoulombs(), 1e-15);
    assertEquals(List.of(2L), steps.voided());
    assertEquals(0, steps.entries(Entry.GrantBooked.class).size());
  }
}
