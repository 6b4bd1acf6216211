package beamwarden.simulated;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.instrument.FaultKind;
import beamwarden.instrument.Grant;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.Receipt;
import beamwarden.instrument.StopWhen;
import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;

/** How exposures end before their time: promises P6, P7, P10 to P12 and P16 to P18. */
class EndingTest {
  private final Session session = Session.exact();

  @Nested
  class TheStop {
    @Test
    void atTheBoundaryFinishesTheLine() {
      exposeHalfALine();
      session.instrument.stop(StopWhen.AT_BOUNDARY);
      session.pass(Duration.ofMinutes(1));
      assertEquals(21, session.receipt().unitsDone());
      assertEquals(21, session.receipt().unitsTouched());
      assertTrue(session.receipt().fault().isEmpty());
    }

    @Test
    void nowLeavesAPartOfALine() {
      exposeHalfALine();
      session.instrument.stop(StopWhen.NOW);
      session.pass(Duration.ofMinutes(1));
      assertEquals(20, session.receipt().unitsDone());
      assertEquals(21, session.receipt().unitsTouched());
    }

    @Test
    void atASliceFinishesTheSlice() {
      session.expose(session.spot(1, Duration.ofMinutes(10)));
      session.pass(Duration.ofSeconds(70));
      session.instrument.stop(StopWhen.AT_BOUNDARY);
      session.pass(Duration.ofMinutes(1));
      assertEquals(Duration.ofSeconds(90), session.receipt().beamOn());
    }

    @Test
    void beforeTheFirstElectronLeavesNothing() {
      session.expose(session.map(1, 500));
      session.pass(Duration.ofSeconds(1));
      session.instrument.stop(StopWhen.AT_BOUNDARY);
      session.pass(Duration.ZERO);
      assertEquals(0, session.receipt().unitsTouched());
      assertEquals(List.of(), session.truth.stretches());
    }

    @Test
    void leavesNothingBehindThatEndsTheNextExposure() {
      session.expose(session.spot(1, Duration.ofMinutes(20)));
      session.pass(Duration.ofSeconds(10));
      session.instrument.stop(StopWhen.NOW);
      session.pass(Duration.ZERO);
      session.expose(session.spot(2, Duration.ofMinutes(20)));
      session.pass(Duration.ofMinutes(19));
      assertEquals(1, session.all(InstrumentEvent.Ended.class).size());
      session.pass(Duration.ofMinutes(1));
      assertEquals(2, session.receipt().grant());
      assertEquals(15e-12 * 1210 / 1.602176634e-19, session.electrons(), 1);
    }

    @Test
    void forbidsWhatWaits() {
      exposeHalfALine();
      session.instrument.begin(session.fresh(session.map(2, 10)));
      session.instrument.stop(StopWhen.NOW);
      session.pass(Duration.ofMinutes(1));
      assertEquals(2, session.last(InstrumentEvent.NotBegun.class).grant());
      assertEquals(1, session.all(InstrumentEvent.Ended.class).size());
    }

    private void exposeHalfALine() {
      session.expose(session.map(1, 500));
      session.pass(Lab.FRAME_START.plusNanos(20 * 25_200_000L + 12_000_000L));
    }
  }

  @Nested
  class TheLease {
    @Test
    void endsTheExposureWhenNoHeartbeatComes() {
      session.expose(leased(session.spot(1, Duration.ofMinutes(10)), Duration.ofSeconds(40)));
      session.pass(Duration.ofMinutes(20));
      Receipt receipt = session.receipt();
      assertEquals(Duration.ofSeconds(40), receipt.beamOn());
      assertEquals(FaultKind.LEASE_ENDED, receipt.fault().orElseThrow().kind());
    }

    @Test
    void isRenewedByEachHeartbeat() {
      session.expose(leased(session.spot(1, Duration.ofMinutes(10)), Duration.ofSeconds(40)));
      for (int beat = 0; beat < 5; beat++) {
        session.pass(Duration.ofSeconds(30));
        session.beat();
      }
      session.pass(Duration.ofMinutes(20));
      assertEquals(Duration.ofSeconds(5 * 30 + 40), session.receipt().beamOn());
    }

    @Test
    void isNotRenewedByAnOldHeartbeat() {
      session.expose(leased(session.spot(1, Duration.ofMinutes(10)), Duration.ofSeconds(40)));
      session.pass(Duration.ofSeconds(30));
      session.instrument.heartbeat(1);
      session.pass(Duration.ofMinutes(20));
      assertEquals(Duration.ofSeconds(40), session.receipt().beamOn());
    }

    @Test
    void isNotRenewedByTheSameHeartbeatAgain() {
      session.expose(leased(session.spot(1, Duration.ofMinutes(10)), Duration.ofSeconds(40)));
      long last = session.beat();
      session.pass(Duration.ofSeconds(30));
      session.instrument.heartbeat(last);
      session.pass(Duration.ofMinutes(20));
      assertEquals(Duration.ofSeconds(40), session.receipt().beamOn());
    }

    @Test
    void isRenewedByTheFirstHeartbeatOfANewConnection() {
      session.expose(leased(session.spot(1, Duration.ofMinutes(10)), Duration.ofSeconds(40)));
      session.pass(Duration.ofSeconds(30));
      session.connect();
      session.instrument.heartbeat(1);
      session.pass(Duration.ofMinutes(20));
      assertEquals(Duration.ofSeconds(70), session.receipt().beamOn());
    }

    @Test
    void endsAnExposureWhoseDaemonIsGone() {
      session.expose(leased(session.spot(1, Duration.ofMinutes(10)), Duration.ofSeconds(40)));
      session.pass(Duration.ofSeconds(10));
      ((SimulatedInstrument) session.instrument).cutConnection();
      session.beat();
      session.pass(Duration.ofMinutes(20));
      assertEquals(15e-12 * 40 / 1.602176634e-19, session.electrons(), 1);
      assertEquals(1, session.all(InstrumentEvent.Lost.class).size());
      assertEquals(0, session.all(InstrumentEvent.Ended.class).size());
    }
  }

  @Nested
  class TheSeal {
    @Test
    void blanksAndReportsWhatWasDone() {
      session.expose(session.spot(1, Duration.ofMinutes(10)));
      session.pass(Duration.ofSeconds(100));
      session.seal(Set.of(1L));
      Receipt receipt = reported(1);
      assertEquals(Duration.ofSeconds(100), receipt.beamOn());
      session.pass(Duration.ofMinutes(20));
      assertEquals(15e-12 * 100 / 1.602176634e-19, session.electrons(), 1);
    }

    @Test
    void forbidsWhatWaitsAndSaysThatItNeverBegan() {
      session.expose(session.spot(1, Duration.ofMinutes(10)));
      session.instrument.begin(session.fresh(session.spot(2, Duration.ofSeconds(1))));
      session.seal(Set.of(1L, 2L));
      session.pass(Duration.ofMinutes(20));
      assertEquals(new GrantFate.NeverBegun(), fates().get(2L));
      assertEquals(1, session.all(InstrumentEvent.Begun.class).size());
    }

    @Test
    void whatItSaidNeverBeganNeverBeginsUnderTheSameFenceEither() {
      long fence = session.fence();
      Grant grant = session.map(9, 10);
      session.prepareFor(grant.exposure());
      session.instrument.seal(fence, Session.STORE, Set.of(9L), false);
      session.instrument.begin(session.fresh(grant));
      session.pass(Duration.ofMinutes(1));
      assertEquals(new GrantFate.NeverBegun(), fates().get(9L));
      assertEquals(9, session.last(InstrumentEvent.NotBegun.class).grant());
    }

    @Test
    void keepsTheReceiptUntilItIsAcknowledged() {
      session.expose(session.map(1, 10));
      session.pass(Duration.ofMinutes(1));
      session.seal(Set.of(1L));
      Receipt first = reported(1);
      assertEquals(session.receipt(), first);
      session.seal(Set.of(1L));
      assertEquals(first, reported(1));
      session.instrument.acknowledge(1);
      session.seal(Set.of(1L));
      assertEquals(new GrantFate.Unknown(), fates().get(1L));
    }

    @Test
    void refusesALowerFence() {
      session.instrument.seal(session.fence() - 1, Session.STORE, Set.of(), false);
      session.pass(Duration.ZERO);
      assertEquals(
          new InstrumentEvent.SealRefused(session.fence(), Session.STORE),
          session.last(InstrumentEvent.SealRefused.class));
    }

    @Test
    void refusesAnotherStoreUnlessAPersonApproved() {
      session.instrument.seal(50, "store-b", Set.of(), false);
      session.pass(Duration.ZERO);
      assertEquals(1, session.all(InstrumentEvent.SealRefused.class).size());
      session.instrument.seal(50, "store-b", Set.of(7L), true);
      session.pass(Duration.ZERO);
      assertEquals("store-b", session.last(InstrumentEvent.Sealed.class).report().store());
      // Nothing is known of what that store may have sent to lost notes.
      assertEquals(new GrantFate.Unknown(), fates().get(7L));
    }

    @Test
    void aHandOverNeedsAHigherFence() {
      session.instrument.seal(session.fence(), "store-b", Set.of(), true);
      session.pass(Duration.ZERO);
      assertEquals(1, session.all(InstrumentEvent.SealRefused.class).size());
    }

    @Test
    void anotherStoreMayUseTheNumbersOfTheFirst() {
      Grant refused = session.map(1, 10);
      session.instrument.begin(session.fresh(refused));
      session.pass(Duration.ZERO);
      assertEquals(1, session.all(InstrumentEvent.NotBegun.class).size());
      session.instrument.seal(50, "store-b", Set.of(), true);
      session.prepareFor(refused.exposure());
      session.instrument.begin(ofStoreB(session.fresh(refused)));
      session.pass(Duration.ofMinutes(1));
      assertEquals(10, session.receipt().unitsDone());
    }

    private static Grant ofStoreB(Grant grant) {
      return new Grant(
          grant.number(),
          "store-b",
          50,
          grant.session(),
          grant.exposure(),
          grant.longestBeamOn(),
          grant.highestCurrent(),
          grant.heartbeat(),
          grant.latestStart(),
          grant.lease(),
          grant.chainHead());
    }

    @Test
    void aSealThatIsRefusedLeavesTheExposureAlone() {
      session.expose(session.spot(1, Duration.ofSeconds(30)));
      session.instrument.seal(50, "store-b", Set.of(), false);
      session.pass(Duration.ofMinutes(1));
      assertEquals(Duration.ofSeconds(30), session.receipt().beamOn());
    }
  }

  @Nested
  class TheSession {
    @Test
    void isTheSameAfterARestart() {
      String before = session.last(InstrumentEvent.Connected.class).session();
      session.restarted().connect();
      assertEquals(before, session.last(InstrumentEvent.Connected.class).session());
    }

    @Test
    void isAnotherAfterAnOpenedDoor() {
      String before = session.last(InstrumentEvent.Connected.class).session();
      session.hardware.openDoor();
      assertEquals(FaultKind.INTERLOCK, session.last(InstrumentEvent.Trouble.class).fault().kind());
      session.connect();
      assertNotEquals(before, session.last(InstrumentEvent.Connected.class).session());
    }

    @Test
    void aDoorEndsTheExposure() {
      session.expose(session.spot(1, Duration.ofMinutes(10)));
      session.pass(Duration.ofSeconds(10));
      session.hardware.openDoor();
      assertEquals(FaultKind.INTERLOCK, session.receipt().fault().orElseThrow().kind());
      assertEquals(Duration.ofSeconds(10), session.receipt().beamOn());
      assertEquals(Optional.empty(), session.hardware.readings().conditions());
      session.instrument.prepare(5, Lab.VIOLET, Lab.MIDDLE);
      session.pass(Duration.ZERO);
      assertEquals(
          FaultKind.INTERLOCK, session.last(InstrumentEvent.NotPrepared.class).fault().kind());
    }
  }

  @Test
  void aTripTakesTheBeamAndTheHighVoltage() {
    session.expose(session.spot(1, Duration.ofMinutes(10)));
    session.pass(Duration.ofSeconds(10));
    session.hardware.tripHighVoltage();
    assertEquals(FaultKind.HIGH_VOLTAGE_TRIP, session.receipt().fault().orElseThrow().kind());
    session.connect();
    assertTrue(!session.last(InstrumentEvent.Connected.class).readings().highVoltageOn());
    session.instrument.prepare(5, Lab.COUNTING, Lab.MIDDLE);
    session.pass(Duration.ZERO);
    assertEquals(
        FaultKind.HIGH_VOLTAGE_TRIP,
        session.last(InstrumentEvent.NotPrepared.class).fault().kind());
  }

  @Test
  void aTripWhilePreparingIsAnswered() {
    session.instrument.prepare(5, Lab.COUNTING, Lab.MIDDLE);
    session.pass(Duration.ofMinutes(5));
    session.hardware.tripHighVoltage();
    session.pass(Duration.ofMinutes(15));
    assertEquals(
        FaultKind.HIGH_VOLTAGE_TRIP,
        session.last(InstrumentEvent.NotPrepared.class).fault().kind());
    assertEquals(Optional.empty(), session.hardware.readings().conditions());
  }

  @Test
  void noCurrentIsMeasuredThroughAClosedValve() {
    session.prepare(Lab.COUNTING, Lab.MIDDLE);
    session.instrument.windDown();
    session.instrument.measure(6);
    session.pass(Duration.ofMinutes(5));
    assertEquals(
        FaultKind.NOT_OFFERED, session.last(InstrumentEvent.NotMeasured.class).fault().kind());
  }

  @Test
  void windingDownBlanksAndClosesTheValve() {
    session.expose(session.spot(1, Duration.ofMinutes(10)));
    session.pass(Duration.ofSeconds(10));
    session.instrument.begin(session.fresh(session.spot(3, Duration.ofSeconds(1))));
    session.instrument.windDown();
    session.pass(Duration.ofMinutes(1));
    assertEquals(3, session.last(InstrumentEvent.NotBegun.class).grant());
    InstrumentEvent.WoundDown wound = session.last(InstrumentEvent.WoundDown.class);
    assertTrue(wound.readings().beamBlanked() && wound.readings().valveClosed());
    assertEquals(Duration.ofSeconds(10), session.receipt().beamOn());
    session.instrument.begin(session.fresh(session.spot(2, Duration.ofSeconds(1))));
    session.pass(Duration.ofMinutes(1));
    assertEquals(2, session.last(InstrumentEvent.NotBegun.class).grant());
  }

  @Test
  void aNewConnectionDropsWhatTheOldOneAskedFor() {
    session.prepare(Lab.VIOLET, Lab.MIDDLE);
    session.instrument.measure(8);
    session.instrument.prepare(9, Lab.COUNTING, Lab.MIDDLE);
    session.pass(Duration.ofSeconds(1));
    session.connect();
    session.pass(Duration.ofHours(1));
    assertEquals(Optional.of(Lab.VIOLET), session.hardware.readings().conditions());
    assertEquals(List.of(), session.all(InstrumentEvent.Measured.class));
  }

  @Test
  void closingBlanksAndKeepsTheReceipt() {
    session.expose(session.spot(1, Duration.ofMinutes(10)));
    session.pass(Duration.ofSeconds(10));
    session.instrument.close();
    assertTrue(session.hardware.readings().beamBlanked());
    session.pass(Duration.ofMinutes(20));
    assertEquals(15e-12 * 10 / 1.602176634e-19, session.electrons(), 1);
    session.restarted().connect();
    session.seal(Set.of(1L));
    assertEquals(Duration.ofSeconds(10), reported(1).beamOn());
  }

  @Test
  void aClosedAdapterAnswersThatItIsLost() {
    session.instrument.close();
    session.instrument.connect(session);
    session.pass(Duration.ZERO);
    assertEquals(1, session.all(InstrumentEvent.Lost.class).size());
  }

  private Map<Long, GrantFate> fates() {
    return session.last(InstrumentEvent.Sealed.class).report().fates();
  }

  private Receipt reported(long grant) {
    return ((GrantFate.Reported) fates().get(grant)).receipt();
  }

  private static Grant leased(Grant grant, Duration lease) {
    return new Grant(
        grant.number(),
        grant.store(),
        grant.fence(),
        grant.session(),
        grant.exposure(),
        grant.longestBeamOn(),
        grant.highestCurrent(),
        grant.heartbeat(),
        grant.latestStart(),
        lease,
        grant.chainHead());
  }
}
