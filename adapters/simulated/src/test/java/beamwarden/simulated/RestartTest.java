package beamwarden.simulated;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.instrument.GrantFate;
import beamwarden.instrument.InstrumentEvent;
import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;

/** What is true when the adapter's process ends without warning, in memory: P3, P11, P12. */
class RestartTest {
  private final Session session = Session.exact();

  @Test
  void theHardwareGoesOnToTheEndOfTheScan() {
    session.expose(session.spot(1, Duration.ofMinutes(10)));
    session.pass(Duration.ofSeconds(10));
    adapter().die();
    session.pass(Duration.ofMinutes(20));
    assertEquals(15e-12 * 600 / 1.602176634e-19, session.electrons(), 1);
  }

  @Test
  void theNextAdapterBlanksWhatIsStillRunning() {
    session.expose(session.spot(1, Duration.ofMinutes(10)));
    session.pass(Duration.ofSeconds(10));
    adapter().die();
    session.pass(Duration.ofSeconds(20));
    session.restarted();
    session.pass(Duration.ofMinutes(20));
    assertEquals(15e-12 * 30 / 1.602176634e-19, session.electrons(), 1);
  }

  @Test
  void whatWasInterruptedIsUnknownAndNotNothing() {
    session.expose(session.spot(1, Duration.ofMinutes(10)));
    adapter().die();
    session.restarted().connect();
    session.seal(Set.of(1L, 2L));
    assertEquals(
        Map.of(1L, new GrantFate.Unknown(), 2L, new GrantFate.NeverBegun()),
        session.last(InstrumentEvent.Sealed.class).report().fates());
  }

  @Test
  void whatWasInterruptedIsNeverExposedAgain() {
    session.expose(session.spot(1, Duration.ofSeconds(1)));
    session.pass(Duration.ofMillis(500));
    adapter().die();
    session.restarted().ready();
    session.expose(session.spot(1, Duration.ofSeconds(1)));
    session.pass(Duration.ofMinutes(1));
    assertEquals(1, session.truth.stretches().size());
  }

  @Test
  void aDeadAdapterSaysThatItIsLostAndNothingMore() {
    session.expose(session.spot(1, Duration.ofMinutes(10)));
    adapter().die();
    int heard = session.heard.size();
    assertTrue(session.heard.get(heard - 1) instanceof InstrumentEvent.Lost);
    session.beat();
    session.pass(Duration.ofHours(1));
    assertEquals(heard, session.heard.size());
  }

  @Test
  void theConditionsAreStillThere() {
    session.prepare(Lab.VIOLET, Lab.MIDDLE);
    session.restarted().connect();
    InstrumentEvent.Connected connected = session.last(InstrumentEvent.Connected.class);
    assertEquals(Optional.of(Lab.VIOLET), connected.readings().conditions());
  }

  /** Goal: each crash between two durable steps leaves the truth that the contract promises. */
  @Nested
  class AtEachStep {
    @Test
    void beforeTheNoteNothingHasBegun() {
      assertDiesAt(FaultPlan.Step.BEFORE_BEGUN_NOTE, new GrantFate.NeverBegun(), 0);
    }

    @Test
    void afterTheNoteNobodyKnows() {
      assertDiesAt(FaultPlan.Step.AFTER_BEGUN_NOTE, new GrantFate.Unknown(), 0);
    }

    @Test
    void inTheMiddleNobodyKnowsAndTheBeamGoesOn() {
      assertDiesAt(FaultPlan.Step.MID_EXPOSURE, new GrantFate.Unknown(), 60);
    }

    @Test
    void beforeTheReceiptIsKeptNobodyKnows() {
      assertDiesAt(FaultPlan.Step.BEFORE_RECEIPT_KEPT, new GrantFate.Unknown(), 60);
    }

    @Test
    void afterTheReceiptIsKeptItIsReported() {
      Session dying = dyingAt(FaultPlan.Step.AFTER_RECEIPT_KEPT);
      dying.restarted().connect();
      dying.seal(Set.of(1L));
      GrantFate fate = dying.last(InstrumentEvent.Sealed.class).report().fates().get(1L);
      assertEquals(Duration.ofSeconds(60), ((GrantFate.Reported) fate).receipt().beamOn());
    }

    @Test
    void afterTheFenceIsRaisedItStaysRaised() {
      FaultPlan plan = (step, exposed) -> struckAt(FaultPlan.Step.SEAL, step);
      Session dying = new Session(Simulation.inMemory(1).withoutNoise().with(plan));
      dying.connect();
      dying.seal(Set.of());
      assertEquals(List.of(), dying.all(InstrumentEvent.Sealed.class));
      assertEquals(dying.fence(), dying.notes.fence());
    }

    private void assertDiesAt(FaultPlan.Step step, GrantFate fate, double seconds) {
      Session dying = dyingAt(step);
      assertEquals(1, dying.all(InstrumentEvent.Lost.class).size());
      assertEquals(List.of(), dying.all(InstrumentEvent.Ended.class));
      assertEquals(15e-12 * seconds / 1.602176634e-19, dying.electrons(), 1);
      dying.restarted().connect();
      dying.seal(Set.of(1L));
      assertEquals(Map.of(1L, fate), dying.last(InstrumentEvent.Sealed.class).report().fates());
    }

    private Session dyingAt(FaultPlan.Step fatal) {
      FaultPlan plan = (step, exposed) -> struckAt(fatal, step);
      Session dying = new Session(Simulation.inMemory(1).withoutNoise().with(plan)).ready();
      dying.expose(dying.spot(1, Duration.ofMinutes(1)));
      dying.pass(Duration.ofMinutes(5));
      return dying;
    }

    private static Optional<FaultPlan.Strike> struckAt(FaultPlan.Step fatal, FaultPlan.Step step) {
      return step == fatal
          ? Optional.of(new FaultPlan.Strike(Mishap.PROCESS_DIES, 0.25))
          : Optional.empty();
    }
  }

  private SimulatedInstrument adapter() {
    return (SimulatedInstrument) session.instrument;
  }
}
