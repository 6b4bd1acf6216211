package beamwarden.simulated;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.instrument.FaultKind;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.Receipt;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Scripts of faults: how they read, and what each does to the exposure that it strikes. */
class ScriptedFaultsTest {
  @Test
  void readsGrantsAndTimes() {
    ScriptedFaults script = new ScriptedFaults("detector-timeout@grant:3, door-opened@time:36000s");
    assertEquals(
        Optional.of(new FaultPlan.Strike(Mishap.DETECTOR_TIMEOUT, 0.5)),
        script.at(FaultPlan.Step.MID_EXPOSURE, 3));
    assertEquals(Optional.empty(), script.at(FaultPlan.Step.MID_EXPOSURE, 4));
    assertEquals(Optional.empty(), script.at(FaultPlan.Step.PREPARE, 3));
    assertEquals(
        List.of(new FaultPlan.Timed(Duration.ofHours(10), Mishap.DOOR_OPENED)), script.timed());
  }

  @Test
  void refusesWhatItCannotRead() {
    assertEquals(
        "the fault 'door-opened' cannot be read: write a fault, then @grant:3 or @time:36000s,"
            + " such as detector-timeout@grant:3",
        assertThrows(IllegalArgumentException.class, () -> new ScriptedFaults("door-opened"))
            .getMessage());
    assertEquals(
        "there is no fault 'flood': choose one of detector-timeout, lost-connection,"
            + " current-out-of-bounds, high-voltage-trip, door-opened, process-dies",
        assertThrows(IllegalArgumentException.class, () -> new ScriptedFaults("flood@grant:1"))
            .getMessage());
  }

  @ParameterizedTest
  @CsvSource({
    "detector-timeout, DETECTOR_TIMEOUT",
    "current-out-of-bounds, CURRENT_OUT_OF_BOUNDS",
    "high-voltage-trip, HIGH_VOLTAGE_TRIP",
    "door-opened, INTERLOCK"
  })
  void endsTheNamedExposureInItsMiddle(String fault, FaultKind kind) {
    Session session = scripted(fault + "@grant:2");
    exposeTwo(session);
    List<Receipt> receipts =
        session.all(InstrumentEvent.Ended.class).stream()
            .map(InstrumentEvent.Ended::receipt)
            .toList();
    assertEquals(Optional.empty(), receipts.get(0).fault());
    assertEquals(kind, receipts.get(1).fault().orElseThrow().kind());
    assertEquals(15, receipts.get(1).beamOn().toNanos() * 1e-9, 0.001);
  }

  @Test
  void aLostConnectionLetsTheExposureGoOn() {
    Session session = scripted("lost-connection@grant:2");
    exposeTwo(session);
    assertEquals(1, session.all(InstrumentEvent.Lost.class).size());
    assertEquals(1, session.all(InstrumentEvent.Ended.class).size());
    assertEquals(15e-12 * 60 / 1.602176634e-19, session.electrons(), 1);
    session.connect();
    session.seal(Set.of(2L));
    assertEquals(1, session.all(InstrumentEvent.Sealed.class).get(1).report().fates().size());
  }

  @Test
  void aCurrentOutOfBoundsIsAboveTheGrantsAndTheReceiptSaysSo() {
    Session session = scripted("current-out-of-bounds@grant:2");
    exposeTwo(session);
    double truth =
        session.truth.stretches().stream().mapToDouble(Stretch::currentAmperes).max().orElseThrow();
    double shown = session.receipt().highestCurrent().orElseThrow().current().amperes();
    assertTrue(truth > Session.highest(Lab.COUNTING).amperes() && shown >= truth);
  }

  @Test
  void everyStepKnowsTheNumberOfItsExposure() {
    List<String> asked = new ArrayList<>();
    FaultPlan listening =
        (step, exposed) -> {
          asked.add(exposed + " " + step);
          return Optional.empty();
        };
    Simulation simulation = Simulation.inMemory(1).withoutNoise().with(listening);
    Session session = new Session(simulation).ready();
    exposeTwo(session);
    assertEquals(
        List.of(
            "1 SEAL",
            "1 PREPARE",
            "1 BEFORE_BEGUN_NOTE",
            "1 AFTER_BEGUN_NOTE",
            "1 MID_EXPOSURE",
            "1 BEFORE_RECEIPT_KEPT",
            "1 AFTER_RECEIPT_KEPT",
            "2 PREPARE",
            "2 BEFORE_BEGUN_NOTE",
            "2 AFTER_BEGUN_NOTE",
            "2 MID_EXPOSURE",
            "2 BEFORE_RECEIPT_KEPT",
            "2 AFTER_RECEIPT_KEPT"),
        asked);
  }

  @Test
  void aDoorOpensAtItsTime() {
    Session session = scripted("door-opened@time:3600s");
    session.pass(Duration.ofSeconds(3599));
    assertEquals(List.of(), session.all(InstrumentEvent.Trouble.class));
    session.pass(Duration.ofSeconds(1));
    assertEquals(FaultKind.INTERLOCK, session.last(InstrumentEvent.Trouble.class).fault().kind());
  }

  @Test
  void theSameRandomFaultsComeFromTheSameSeed() {
    RandomFaults first = new RandomFaults(5, 0.3);
    RandomFaults second = new RandomFaults(5, 0.3);
    for (int step = 0; step < 100; step++) {
      assertEquals(first.at(FaultPlan.Step.PREPARE, step), second.at(FaultPlan.Step.PREPARE, step));
    }
  }

  private static Session scripted(String script) {
    Simulation simulation = Simulation.inMemory(1).withoutNoise();
    return new Session(simulation.with(new ScriptedFaults(script))).ready();
  }

  private static void exposeTwo(Session session) {
    for (long number = 1; number <= 2; number++) {
      session.expose(session.spot(number, Duration.ofSeconds(30)));
      session.pass(Duration.ofMinutes(2));
    }
  }
}
