package beamwarden.simulated;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.Conditions;
import beamwarden.beam.Exposure;
import beamwarden.beam.Mode;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.Grant;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.Receipt;
import java.time.Duration;
import java.util.List;
import java.util.Set;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;

/** What becomes of a grant: promises P1 to P9 of the contract, without chance. */
class GrantTest {
  private final Session session = Session.exact();

  @Nested
  class OnlyUnderAGrant {
    @Test
    void preparingAndMeasuringSendNothingToASample() {
      session.prepare(Lab.VIOLET, Lab.MIDDLE);
      session.instrument.measure(2);
      session.pass(Duration.ofHours(1));
      assertEquals(List.of(), session.truth.stretches());
    }

    @Test
    void everyStretchNamesItsGrantAndFence() {
      session.expose(session.map(41, 10));
      session.pass(Duration.ofMinutes(1));
      Stretch stretch = session.truth.stretches().get(0);
      assertEquals(41, stretch.grant().orElseThrow());
      assertEquals(session.fence(), stretch.fence());
      assertEquals("sst-07", stretch.sample());
    }
  }

  @Nested
  class InOrderEachOnce {
    @Test
    void exposesInTheOrderOfBeginning() {
      session.prepareFor(session.map(5, 10).exposure());
      session.instrument.begin(session.fresh(session.map(5, 10)));
      session.instrument.begin(session.fresh(session.map(3, 10)));
      session.pass(Duration.ofMinutes(1));
      assertEquals(
          List.of(5L, 3L),
          session.truth.stretches().stream().map(one -> one.grant().getAsLong()).toList());
    }

    @Test
    void neverExposesAGrantTwice() {
      Grant grant = session.map(5, 10);
      session.expose(grant);
      session.instrument.begin(session.fresh(grant));
      session.pass(Duration.ofMinutes(1));
      session.instrument.begin(session.fresh(grant));
      session.pass(Duration.ofMinutes(1));
      assertEquals(1, session.truth.stretches().size());
    }

    @Test
    void neverExposesAGrantTwiceThatCameTwiceWhileItWaited() {
      session.expose(session.map(5, 10));
      session.instrument.begin(session.fresh(session.map(6, 10)));
      session.instrument.begin(session.fresh(session.map(6, 10)));
      session.pass(Duration.ofMinutes(1));
      assertEquals(2, session.truth.stretches().size());
    }

    @Test
    void saysTheReceiptAgainWhenTheGrantComesAgain() {
      Grant grant = session.map(5, 10);
      session.expose(grant);
      session.pass(Duration.ofMinutes(1));
      session.instrument.begin(session.fresh(grant));
      session.pass(Duration.ZERO);
      List<InstrumentEvent.Ended> ended = session.all(InstrumentEvent.Ended.class);
      assertEquals(2, ended.size());
      assertEquals(ended.get(0), ended.get(1));
    }

    @Test
    void doesNotExposeAgainEvenAfterTheReceiptIsForgotten() {
      Grant grant = session.map(5, 10);
      session.expose(grant);
      session.pass(Duration.ofMinutes(1));
      session.instrument.acknowledge(5);
      session.instrument.begin(session.fresh(grant));
      session.pass(Duration.ofMinutes(1));
      assertEquals(1, session.truth.stretches().size());
      assertEquals(1, session.all(InstrumentEvent.Ended.class).size());
    }
  }

  @Nested
  class TheGrantsTime {
    @Test
    void blanksWhenItIsUsedUp() {
      // 10 lines of 25 ms; 80 ms less the time to blank, 0.1 ms, is 3 lines and a part of one.
      session.expose(Session.lasting(session.map(1, 10), Duration.ofMillis(80)));
      session.pass(Duration.ofMinutes(1));
      Receipt receipt = session.receipt();
      assertEquals(Duration.ofNanos(79_900_000), receipt.beamOn());
      assertEquals(3, receipt.unitsDone());
      assertEquals(4, receipt.unitsTouched());
      assertEquals(350e-12 * 0.0799 / 1.602176634e-19, session.electrons(), 1);
    }

    @Test
    void writesThePartOfALineAsARectangleOfItsOwn() {
      session.expose(Session.lasting(session.map(1, 10), Duration.ofNanos(62_600_000)));
      session.pass(Duration.ofMinutes(1));
      assertEquals(2, session.truth.stretches().size());
      Stretch part = session.truth.stretches().get(1);
      assertEquals(50e-6, part.widthMetres(), 1e-15);
      assertEquals(0.1e-6, part.heightMetres(), 1e-15);
      // It lies left of the middle, in the third line from the top.
      assertEquals(-25e-6, part.centre().xMetres(), 1e-15);
      assertEquals(24.75e-6, part.centre().yMetres(), 1e-15);
    }

    @Test
    void blankedFlybackDoesNotCount() {
      session.expose(Session.lasting(session.map(1, 500), Duration.ofMillis(12_500)));
      session.pass(Duration.ofMinutes(1));
      assertEquals(500, session.receipt().unitsDone());
    }

    @Test
    void flybackThatIsNotBlankedCounts() {
      Session slow =
          new Session(Lab.abilities(Blanker.Kind.SLOW), Simulation.inMemory(1).withoutNoise())
              .ready();
      slow.expose(Session.lasting(slow.map(1, 500), Duration.ofMinutes(1)));
      slow.pass(Duration.ofMinutes(1));
      assertEquals(Duration.ofNanos(12_500_000_000L + 499 * 200_000), slow.receipt().beamOn());
      Stretch strip = slow.truth.stretches().get(1);
      assertEquals(Stretch.Shape.STRIP, strip.shape());
      assertEquals(350e-12 * 499 * 200e-6 / 1.602176634e-19, strip.electrons(), 1);
      assertEquals(50e-6, strip.heightMetres(), 1e-15);
    }
  }

  @Nested
  class TheGrantsCurrent {
    @Test
    void endsAtOnceWhenTheCurrentRises() {
      session.expose(session.map(1, 500));
      session.pass(Lab.FRAME_START.plusSeconds(5));
      session.hardware.surge(2);
      session.pass(Duration.ofMinutes(1));
      Receipt receipt = session.receipt();
      assertEquals(FaultKind.CURRENT_OUT_OF_BOUNDS, receipt.fault().orElseThrow().kind());
      assertEquals(700e-12, receipt.highestCurrent().orElseThrow().current().amperes(), 1e-18);
      assertEquals(350e-12, receipt.lowestCurrent().orElseThrow().current().amperes(), 1e-18);
      double seconds = receipt.beamOn().toNanos() * 1e-9;
      assertEquals(
          (350e-12 * (seconds - 1e-4) + 700e-12 * 1e-4) / 1.602176634e-19,
          session.electrons(),
          1e-6 * session.electrons());
    }

    @Test
    void endsAtOnceWhenItIsTooHighFromTheStart() {
      session.prepareFor(session.map(1, 500).exposure());
      session.hardware.surge(2);
      session.instrument.begin(session.fresh(session.map(1, 500)));
      session.pass(Duration.ofMinutes(1));
      assertEquals(FaultKind.CURRENT_OUT_OF_BOUNDS, session.receipt().fault().orElseThrow().kind());
      assertEquals(Lab.ALONE, session.receipt().beamOn());
      assertEquals(1, session.receipt().unitsTouched());
    }
  }

  @Nested
  class TheLatestStart {
    @Test
    void isCountedFromTheNamedHeartbeat() {
      Grant grant = session.map(1, 10);
      session.prepareFor(grant.exposure());
      long named = session.beat();
      session.pass(Duration.ofSeconds(61));
      session.beat();
      session.instrument.begin(Session.with(grant, named));
      session.pass(Duration.ofMinutes(1));
      assertNeverBegun(1, FaultKind.STARTED_TOO_LATE);
    }

    @Test
    void refusesAHeartbeatThatNeverCame() {
      Grant grant = session.map(1, 10);
      session.prepareFor(grant.exposure());
      session.instrument.begin(Session.with(grant, 1_000));
      session.pass(Duration.ofMinutes(1));
      assertNeverBegun(1, FaultKind.STARTED_TOO_LATE);
    }

    @Test
    void holdsForAGrantThatWaitsBehindAnother() {
      Grant first = session.spot(1, Duration.ofMinutes(2));
      session.expose(first);
      session.instrument.begin(session.fresh(session.spot(2, Duration.ofSeconds(1))));
      session.pass(Duration.ofMinutes(5));
      assertNeverBegun(2, FaultKind.STARTED_TOO_LATE);
      assertEquals(1, session.all(InstrumentEvent.Ended.class).size());
    }
  }

  @Test
  void refusesToBeginWhenTheLeaseIsOverAlready() {
    Grant grant = session.map(1, 10);
    session.prepareFor(grant.exposure());
    Grant late = session.fresh(grant);
    session.pass(Session.LEASE.plusSeconds(1));
    session.instrument.begin(lasting(late, Duration.ofDays(1)));
    session.pass(Duration.ofMinutes(1));
    assertNeverBegun(1, FaultKind.LEASE_ENDED);
  }

  @Test
  void refusesToBeginWithoutHighVoltage() {
    Grant grant = session.map(1, 10);
    session.prepareFor(grant.exposure());
    session.hardware.tripHighVoltage();
    session.instrument.begin(session.fresh(grant));
    session.pass(Duration.ofMinutes(1));
    assertNeverBegun(1, FaultKind.HIGH_VOLTAGE_TRIP);
  }

  @Nested
  class TheFence {
    @Test
    void nothingBeginsBeforeASeal() {
      Session unsealed = new Session(Simulation.inMemory(1).withoutNoise());
      unsealed.connect();
      unsealed.beat();
      unsealed.prepareFor(unsealed.map(1, 10).exposure());
      unsealed.instrument.begin(unsealed.fresh(unsealed.map(1, 10)));
      unsealed.pass(Duration.ofMinutes(1));
      assertEquals(1, unsealed.all(InstrumentEvent.NotBegun.class).size());
      assertEquals(List.of(), unsealed.truth.stretches());
    }

    @Test
    void refusesALowerFence() {
      Grant old = session.map(1, 10);
      session.prepareFor(old.exposure());
      session.seal(Set.of());
      session.instrument.begin(session.fresh(old));
      session.pass(Duration.ofMinutes(1));
      assertNeverBegun(1, FaultKind.READINGS_DISAGREE);
    }

    @Test
    void refusesAnotherSession() {
      Grant grant = session.map(1, 10);
      session.hardware.openDoor();
      session.pass(Duration.ofMinutes(30));
      session.prepareFor(grant.exposure());
      session.instrument.begin(session.fresh(grant));
      session.pass(Duration.ofMinutes(1));
      assertNeverBegun(1, FaultKind.READINGS_DISAGREE);
    }

    @Test
    void asksForASealAfterEveryConnection() {
      session.prepareFor(session.map(1, 10).exposure());
      session.connect();
      session.instrument.begin(session.fresh(session.map(1, 10)));
      session.pass(Duration.ofMinutes(1));
      assertNeverBegun(1, FaultKind.READINGS_DISAGREE);
    }

    @Test
    void whatWasRefusedIsRefusedForGood() {
      Grant grant = session.map(1, 10);
      session.instrument.begin(Session.with(grant, 1_000));
      session.pass(Duration.ZERO);
      session.prepareFor(grant.exposure());
      session.instrument.begin(session.fresh(grant));
      session.pass(Duration.ofMinutes(1));
      assertEquals(2, session.all(InstrumentEvent.NotBegun.class).size());
      assertEquals(List.of(), session.truth.stretches());
    }
  }

  @Nested
  class WhatTheInstrumentIsReadyFor {
    @Test
    void refusesOtherConditionsThanThePrepared() {
      session.prepare(
          new Conditions(Lab.GENTLE, Mode.INTENSITY_MAP, "red"),
          session.map(1, 10).exposure().stageTarget());
      session.instrument.begin(session.fresh(session.map(1, 10)));
      session.pass(Duration.ofMinutes(1));
      assertNeverBegun(1, FaultKind.READINGS_DISAGREE);
    }

    @Test
    void refusesAnotherPlaceThanThePrepared() {
      session.prepare(Lab.VIOLET, Lab.MIDDLE);
      session.instrument.begin(session.fresh(session.map(1, 10)));
      session.pass(Duration.ofMinutes(1));
      assertNeverBegun(1, FaultKind.READINGS_DISAGREE);
    }

    @Test
    void refusesARasterLargerThanTheField() {
      RasterScan wide =
          new RasterScan(
              Rectangle.of(Lab.MIDDLE, 310e-6, 10e-6),
              10,
              10,
              0,
              10,
              Duration.ofNanos(25_000),
              Duration.ZERO);
      session.expose(session.grant(1, Lab.VIOLET, wide));
      session.pass(Duration.ofMinutes(1));
      assertNeverBegun(1, FaultKind.NOT_OFFERED);
    }

    @Test
    void refusesAModeThatItDoesNotHave() {
      Exposure exposure = session.map(1, 10).exposure();
      session.instrument.prepare(
          77, new Conditions(Lab.GENTLE, Mode.DECAY_TRACE, "red"), exposure.stageTarget());
      session.pass(Duration.ZERO);
      assertEquals(
          FaultKind.NOT_OFFERED, session.last(InstrumentEvent.NotPrepared.class).fault().kind());
    }

    @Test
    void refusesAPlaceThatTheStageDoesNotReach() {
      session.instrument.prepare(77, Lab.VIOLET, Lab.MIDDLE.plus(0.03, 0));
      session.pass(Duration.ZERO);
      assertEquals(
          FaultKind.REGION_UNREACHABLE,
          session.last(InstrumentEvent.NotPrepared.class).fault().kind());
    }
  }

  @Test
  void tellsProgressAFewTimesAndNeverTooMuch() {
    session.expose(session.map(1, 500));
    session.pass(Duration.ofMinutes(1));
    List<InstrumentEvent.Progress> told = session.all(InstrumentEvent.Progress.class);
    assertTrue(told.size() >= 5 && told.size() <= 20, () -> told.size() + " events");
    assertFalse(told.stream().anyMatch(one -> one.unitsDone() > 500));
  }

  private static Grant lasting(Grant grant, Duration latestStart) {
    return new Grant(
        grant.number(),
        grant.store(),
        grant.fence(),
        grant.session(),
        grant.exposure(),
        grant.longestBeamOn(),
        grant.highestCurrent(),
        grant.heartbeat(),
        latestStart,
        grant.lease(),
        grant.chainHead());
  }

  private void assertNeverBegun(long grant, FaultKind kind) {
    InstrumentEvent.NotBegun refusal = session.last(InstrumentEvent.NotBegun.class);
    assertEquals(grant, refusal.grant());
    assertEquals(kind, refusal.fault().kind());
    assertFalse(
        session.truth.stretches().stream().anyMatch(one -> one.grant().getAsLong() == grant));
  }
}
