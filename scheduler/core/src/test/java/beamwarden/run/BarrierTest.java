package beamwarden.run;

import static org.junit.jupiter.api.Assertions.assertEquals;

import beamwarden.beam.RasterScan;
import beamwarden.instrument.Fault;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.Receipt;
import beamwarden.instrument.StopWhen;
import beamwarden.ledger.JobRecord;
import beamwarden.queue.JobState;
import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Stream;
import org.junit.jupiter.api.Named;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;

/** What was stored ahead and not sent is voided at every barrier, and never sent. */
class BarrierTest {
  private static final Event.Wish STOP = new Event.Wish.Stop(StopWhen.AT_BOUNDARY);
  private static final Event.Wish STOP_NOW = new Event.Wish.Stop(StopWhen.NOW);

  /** What is raised while grant 1 exposes, and how soon the exposure must end. */
  static Stream<Arguments> raisedWhileOneExposes() {
    return Stream.of(
        barrier("hold", asked(new Event.Wish.Hold(List.of("survey"))), StopWhen.AT_BOUNDARY),
        barrier(
            "withdraw", asked(new Event.Wish.Withdraw(List.of("survey"))), StopWhen.AT_BOUNDARY),
        barrier("stop", asked(STOP), StopWhen.AT_BOUNDARY),
        barrier("stop --now", asked(STOP_NOW), StopWhen.NOW),
        barrier(
            "a tripped high voltage",
            steps -> steps.tell(trouble(FaultKind.HIGH_VOLTAGE_TRIP)),
            StopWhen.NOW));
  }

  /** Something happens to a run; all commands that follow. */
  private interface Raised {
    List<Command> on(Steps steps);
  }

  private static Arguments barrier(String name, Raised raised, StopWhen when) {
    return Arguments.of(Named.of(name, raised), when);
  }

  private static Raised asked(Event.Wish wish) {
    return steps -> steps.take(new Event.Asked(1000, wish));
  }

  private static InstrumentEvent.Trouble trouble(FaultKind kind) {
    return new InstrumentEvent.Trouble(new Fault(kind, "it went off"));
  }

  @ParameterizedTest
  @MethodSource("raisedWhileOneExposes")
  void aBarrierStopsTheExposureAndVoidsTheNext(Raised raised, StopWhen when) {
    Steps steps = Steps.exposing(Lab.map("survey"));
    List<Command> commands = raised.on(steps);
    assertEquals(when, Commands.only(Command.StopExposure.class, commands).when());
    assertEquals(List.of(2L), steps.voided());
    assertEquals(Lab.UPPER_COULOMBS, steps.upperCoulombs(), 1e-15);
  }

  @ParameterizedTest
  @MethodSource("raisedWhileOneExposes")
  void afterABarrierTheReceiptIsBookedAndNothingIsSent(Raised raised, StopWhen when) {
    Steps steps = Steps.exposing(Lab.map("survey"));
    raised.on(steps);
    List<Command> commands = endsAfter(steps, 12);
    assertEquals(List.of(), Commands.of(Command.Begin.class, commands), when.toString());
    assertEquals(12, steps.job("survey").done().units(0));
    assertEquals(Map.of(), steps.books().unresolved());
  }

  /** The receipt of grant 1, with so many lines done. */
  private static List<Command> endsAfter(Steps steps, long lines) {
    Duration beamOn = Lab.LINE.multipliedBy(lines);
    steps.later(beamOn);
    return steps.tell(new InstrumentEvent.Ended(steps.receipt(1, lines, beamOn, Optional.empty())));
  }

  @Test
  void aStopForNowAfterAStopAtTheBoundaryIsPassedOn() {
    Steps steps = Steps.exposing(Lab.map("survey"));
    steps.take(new Event.Asked(1000, STOP));
    List<Command> commands = steps.take(new Event.Asked(1001, STOP_NOW));
    assertEquals(StopWhen.NOW, Commands.only(Command.StopExposure.class, commands).when());
    assertEquals(List.of(), Commands.of(Command.StopExposure.class, steps.wake()));
  }

  @Test
  void theWindDownDoesNotWaitForAStopAtTheBoundary() {
    Steps steps =
        Steps.begun(Lab.setup(Lab.night()), Lab.WIND_DOWN.minus(Lab.EXPOSURE.multipliedBy(2)))
            .goesOnline(Lab.sample(), Lab.map("survey"))
            .exposes();
    steps.ends(1);
    steps.begins(2);
    steps.take(new Event.Asked(1000, STOP));
    List<Command> commands = steps.at(Lab.WIND_DOWN).wake();
    assertEquals(StopWhen.NOW, Commands.only(Command.StopExposure.class, commands).when());
  }

  @Test
  void aTripAfterAStopAtTheBoundaryStopsAtOnce() {
    Steps steps = Steps.exposing(Lab.map("survey"));
    steps.take(new Event.Asked(1000, STOP));
    List<Command> commands = steps.tell(trouble(FaultKind.HIGH_VOLTAGE_TRIP));
    assertEquals(StopWhen.NOW, Commands.only(Command.StopExposure.class, commands).when());
  }

  @Test
  void aHoldOfAnotherJobIsNoBarrier() {
    Steps steps = Steps.exposing(Lab.map("survey"), Lab.map("close-up"));
    steps.ask(new Event.Wish.Hold(List.of("close-up")));
    assertEquals(List.of(), steps.voided());
    assertEquals(2, Commands.only(Command.Begin.class, steps.ends(1)).grant().number());
  }

  @Test
  void aReceiptThatEndedEarlyVoidsTheNextAndTheRestIsGrantedAnew() {
    Steps steps = Steps.exposing(Lab.map("survey"));
    List<Command> commands = endsAfter(steps, 12);
    assertEquals(List.of(2L), steps.voided());
    assertEquals(List.of(3L), begun(commands));
    assertEquals(12, firstLine(steps, 3));
  }

  @Test
  void aCountThatHasEnoughVoidsTheNextAndIsDone() {
    Steps steps = Steps.exposing(Lab.count("pairs", 500));
    List<Command> commands = endsWithCounts(steps, 1, 500);
    assertEquals(List.of(2L), steps.voided());
    assertEquals(List.of(), begun(commands));
    assertEquals(JobState.DONE, steps.job("pairs").state());
  }

  @Test
  void aCountThatHasNotEnoughYetGoesOn() {
    Steps steps = Steps.exposing(Lab.count("pairs", 500));
    assertEquals(List.of(2L), begun(endsWithCounts(steps, 1, 499)));
    steps.begins(2);
    endsWithCounts(steps, 2, 1);
    assertEquals(List.of(3L), steps.voided());
    assertEquals(JobState.DONE, steps.job("pairs").state());
  }

  private static List<Command> endsWithCounts(Steps steps, long grant, long coincidences) {
    Receipt whole = steps.later(Lab.EXPOSURE).whole(grant);
    Receipt counted =
        new Receipt(
            grant,
            whole.fence(),
            whole.unitsDone(),
            whole.unitsTouched(),
            whole.beamOn(),
            Optional.empty(),
            Optional.empty(),
            Map.of(JobRecord.COINCIDENCES, coincidences),
            List.of(),
            Optional.empty());
    return steps.tell(new InstrumentEvent.Ended(counted));
  }

  private static List<Long> begun(List<Command> commands) {
    return Commands.of(Command.Begin.class, commands).stream()
        .map(begin -> begin.grant().number())
        .toList();
  }

  private static int firstLine(Steps steps, long grant) {
    return ((RasterScan) steps.opened(grant).exposure().scan()).firstRow();
  }
}
