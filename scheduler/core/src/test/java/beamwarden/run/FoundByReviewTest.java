package beamwarden.run;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.instrument.FaultKind;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.Receipt;
import beamwarden.instrument.SealReport;
import beamwarden.ledger.Entry;
import beamwarden.ledger.GrantState;
import beamwarden.queue.HeldFor;
import beamwarden.queue.JobState;
import java.time.Duration;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;

/** Ways in which a run once went on, or gave up, where it must not. */
class FoundByReviewTest {
  private static void sealsAfterALoss(Steps steps, String session, Map<Long, GrantFate> fates) {
    steps.tell(new InstrumentEvent.Lost("gone"));
    steps.later(steps.setup().waits().reconnectAfter()).wake();
    steps.tell(Steps.connected(session));
    steps.sealed(fates);
  }

  @ParameterizedTest
  @EnumSource(FaultKind.class)
  void aFaultInAReceiptLearntBySealingIsActedUpon(FaultKind kind) {
    Steps steps = Steps.exposing(Lab.map("survey"));
    Receipt half = steps.receipt(1, 15, Lab.LINE.multipliedBy(15), steps.fault(kind));
    sealsAfterALoss(
        steps, "first", Map.of(1L, new GrantFate.Reported(half), 2L, new GrantFate.NeverBegun()));
    switch (kind.remedy()) {
      case STOP_NIGHT -> assertTrue(steps.books().stopped().isPresent(), kind.name());
      case GIVE_UP_JOB -> assertEquals(JobState.FAILED, steps.job("survey").state());
      case RETRY_HERE, RETRY_AFTER_RECOVERY ->
          assertEquals(1, steps.job("survey").faultsInARow(), kind.name());
    }
  }

  @Test
  void aStoredGrantIsVoidedWhenACapOfItsSampleIsLowered() {
    Steps steps = Steps.online(Lab.sample(Lab.charge(1)), Lab.map("survey")).exposes();
    steps.submit(Lab.sample(Lab.charge(Lab.UPPER_COULOMBS * 1.5)), Lab.map("other"));
    List<Command> after = steps.ends(1);
    assertEquals(List.of(), Commands.of(Command.Begin.class, after));
    assertTrue(steps.upperCoulombs() <= Lab.UPPER_COULOMBS * 1.5);
  }

  @Test
  void outcomesThatStayUnknownUseUpTheRetries() {
    Steps steps = Steps.exposing(Lab.map("survey"));
    long grant = 1;
    int tries = 0;
    while (!steps.job("survey").state().ended() && tries < 20) {
      tries++;
      Map<Long, GrantFate> fates = new HashMap<>();
      for (long open : steps.books().unresolved().keySet()) {
        boolean unknown =
            open == grant || steps.books().unresolved().get(open).state() == GrantState.PRESUMED;
        fates.put(open, unknown ? new GrantFate.Unknown() : new GrantFate.NeverBegun());
      }
      sealsAfterALoss(steps, "first", fates);
      if (!steps.job("survey").state().ended()) {
        grant = steps.begin().number();
        steps.begins(grant);
      }
    }
    assertEquals(JobState.FAILED, steps.job("survey").state());
    assertEquals(Lab.RETRIES + 1, tries);
  }

  @Test
  void aPersonsHoldOutlivesTheConfirmationOfPlacements() {
    Steps steps = Steps.exposing(Lab.map("survey"), Lab.map("other"));
    sealsAfterALoss(
        steps, "second", Map.of(1L, new GrantFate.Unknown(), 2L, new GrantFate.NeverBegun()));
    assertEquals(Optional.of(HeldFor.PLACEMENTS), steps.job("other").heldFor());
    steps.ask(new Event.Wish.Hold(List.of("other")));
    assertEquals(Optional.of(HeldFor.PLACEMENTS), steps.job("other").heldFor());
    steps.ask(new Event.Wish.Approve(Entry.Approved.PLACEMENTS, "looked"));
    assertEquals(Optional.of(HeldFor.A_PERSON), steps.job("other").heldFor());
  }

  @Test
  void heartbeatsKeepCountingWhenASealComesOnTheSameConnection() {
    Steps steps = Steps.exposing(Lab.map("survey"));
    List<Command> all = new ArrayList<>();
    while (Commands.of(Command.Seal.class, all).isEmpty()) {
      all.addAll(steps.later(Duration.ofSeconds(14)).wake());
    }
    long before = steps.state().beat().sent();
    steps.tell(
        new InstrumentEvent.Sealed(
            new SealReport(steps.state().link().fence(), Lab.STORE, 0, Map.of())));
    assertTrue(steps.state().beat().sent() >= before, "beats may not begin again");
  }

  @Test
  void nothingIsHandedOverWhenNothingWaitsForIt() {
    Steps steps = Steps.exposing(Lab.map("survey"));
    steps.ask(new Event.Wish.Approve(Entry.Approved.HAND_OVER, "just in case"));
    assertTrue(!steps.books().handOverApproved());
  }

  @Test
  void booksThatKnowFewerGrantsThanTheInstrumentAreAnOlderCopy() {
    Steps steps = Steps.exposing(Lab.map("survey"));
    steps.tell(new InstrumentEvent.Lost("gone"));
    steps.later(steps.setup().waits().reconnectAfter()).wake();
    steps.tell(Steps.connected("first"));
    Map<Long, GrantFate> fates =
        Map.of(1L, new GrantFate.Unknown(), 2L, new GrantFate.NeverBegun());
    long fence = steps.state().link().fence();
    steps.tell(new InstrumentEvent.Sealed(new SealReport(fence, Lab.STORE, 40, fates)));
    assertEquals(Link.Phase.FOREIGN, steps.state().link().phase());
    assertEquals(
        "the instrument has begun grant 40, and the books know none beyond 2: the store is an older"
            + " copy; approve hand-over to take it over",
        steps.books().stopped().orElseThrow());
    steps.ask(new Event.Wish.Approve(Entry.Approved.HAND_OVER, "the disk was lost"));
    steps.later(steps.setup().waits().reconnectAfter()).wake();
    steps.tell(Steps.connected("first"));
    long again = steps.state().link().fence();
    steps.tell(new InstrumentEvent.Sealed(new SealReport(again, Lab.STORE, 40, fates)));
    assertEquals(40, steps.books().lastGrant());
    assertTrue(steps.books().stopped().isPresent());
  }
}
