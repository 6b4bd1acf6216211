package beamwarden.kit;

import static org.junit.jupiter.api.Assertions.assertEquals;

import beamwarden.instrument.Fault;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.InstrumentEvent.Begun;
import beamwarden.instrument.InstrumentEvent.Ended;
import beamwarden.instrument.InstrumentEvent.NotBegun;
import beamwarden.instrument.InstrumentEvent.Progress;
import beamwarden.instrument.Receipt;
import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.junit.jupiter.api.Test;

class EventOrderTest {
  private static final Begun BEGUN = new Begun(7);
  private static final NotBegun REFUSED =
      new NotBegun(7, new Fault(FaultKind.NOT_OFFERED, "it may not"));

  @Test
  void acceptsAnExposureFromBeginningToEnd() {
    assertEquals(Optional.empty(), broken(BEGUN, new Progress(7, 1), new Progress(7, 1), ended(2)));
  }

  @Test
  void acceptsThatTheSameReceiptIsToldAgain() {
    assertEquals(Optional.empty(), broken(BEGUN, ended(2), ended(2)));
  }

  @Test
  void acceptsThatAGrantIsRefusedAgain() {
    assertEquals(Optional.empty(), broken(REFUSED, REFUSED));
  }

  @Test
  void refusesASecondBeginning() {
    assertEquals(Optional.of("grant 7 began twice"), broken(BEGUN, ended(2), BEGUN));
  }

  @Test
  void refusesARefusalAfterABeginning() {
    assertEquals(Optional.of("grant 7 was refused after it had begun"), broken(BEGUN, REFUSED));
  }

  @Test
  void refusesABeginningAfterARefusal() {
    assertEquals(Optional.of("grant 7 began after it had been refused"), broken(REFUSED, BEGUN));
  }

  @Test
  void refusesAnEndWithoutABeginning() {
    assertEquals(Optional.of("grant 7 ended and had not begun"), broken(ended(2)));
  }

  @Test
  void refusesASecondReceiptThatSaysSomethingElse() {
    assertEquals(Optional.of("grant 7 ended with two receipts"), broken(BEGUN, ended(2), ended(3)));
  }

  @Test
  void refusesProgressOfWhatIsNotExposing() {
    Optional<String> wrong = Optional.of("grant 7 showed progress while it was not exposing");
    assertEquals(wrong, broken(new Progress(7, 1)));
    assertEquals(wrong, broken(BEGUN, ended(2), new Progress(7, 1)));
  }

  @Test
  void refusesProgressThatGoesBack() {
    assertEquals(
        Optional.of("grant 7 went back from 2 to 1 units"),
        broken(BEGUN, new Progress(7, 2), new Progress(7, 1)));
  }

  private static Optional<String> broken(InstrumentEvent... events) {
    return EventOrder.broken(List.of(events));
  }

  private static Ended ended(long units) {
    return new Ended(
        new Receipt(
            7,
            1,
            units,
            units,
            Duration.ofSeconds(units),
            Optional.empty(),
            Optional.empty(),
            Map.of(),
            List.of(),
            Optional.empty()));
  }
}
