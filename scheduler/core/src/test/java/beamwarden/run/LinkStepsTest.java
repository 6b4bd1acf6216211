package beamwarden.run;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.instrument.Abilities;
import beamwarden.instrument.CurrentMeter;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.Receipt;
import beamwarden.instrument.SealReport;
import beamwarden.ledger.Entry;
import beamwarden.ledger.GrantState;
import beamwarden.quantity.Current;
import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;

/** Connecting and sealing, and what a seal's answer means for the books. */
class LinkStepsTest {
  private static final InstrumentEvent.Lost LOST = new InstrumentEvent.Lost("the cable is out");

  @Nested
  class NothingIsSentBeforeTheInstrumentIsSealed {
    @Test
    void connectsThenRaisesTheFenceThenSealsThenBeatsThenPrepares() {
      Steps steps = Steps.begun();
      assertEquals(List.of("Commit", "Connect"), Commands.kinds(steps.wake()));
      assertEquals(
          List.of("Commit", "RaiseFence", "Seal"),
          Commands.kinds(steps.tell(Steps.connected("first"))));
      steps.submit(Lab.sample(), Lab.map("survey"));
      List<Command> sealed =
          steps.tell(
              new InstrumentEvent.Sealed(
                  new SealReport(steps.state().link().fence(), Lab.STORE, 0, Map.of())));
      assertEquals(List.of("Heartbeat", "Prepare"), Commands.kinds(sealed));
    }

    @Test
    void sealsUnderTheFenceThatWasRaisedForThisVerySealing() {
      Steps steps = Steps.begun();
      long atStart = steps.state().link().fence();
      steps.wake();
      List<Command> commands = steps.tell(Steps.connected("first"));
      assertEquals(atStart + 1, Commands.only(Command.Seal.class, commands).fence());
    }

    @Test
    void asksNothingOfAnInstrumentThatIsNotSealed() {
      Steps steps = Steps.begun();
      steps.wake();
      steps.submit(Lab.sample(), Lab.map("survey"));
      assertEquals(List.of(), steps.wake());
      steps.tell(Steps.connected("first"));
      assertEquals(List.of(), steps.wake());
    }

    @Test
    void asksNothingBeforeAHeartbeatIsAnswered() {
      Steps steps = Steps.begun().unansweredHeartbeats();
      steps.goesOnline(Lab.sample(), Lab.map("survey"));
      assertEquals(List.of(), steps.wake());
      assertEquals(
          List.of("Prepare"), Commands.kinds(steps.tell(new InstrumentEvent.HeartbeatSeen(1))));
    }
  }

  @Nested
  class AnInstrumentThatCannotBeReliedUponIsSealedAgain {
    @Test
    void aLostConnectionIsTriedAgainAndSealedAboutTheOpenGrants() {
      Steps steps = Steps.exposing(Lab.map("survey"));
      assertEquals(List.of("Noted"), Commands.stored(steps.tell(LOST)));
      assertEquals(List.of(), steps.wake());
      steps.later(steps.setup().waits().reconnectAfter());
      assertEquals(List.of("Connect"), Commands.kinds(steps.wake()));
      List<Command> commands = steps.tell(Steps.connected("first"));
      assertEquals(List.of("RaiseFence", "Seal"), Commands.kinds(commands));
      assertEquals(Set.of(1L, 2L), Commands.only(Command.Seal.class, commands).grants());
    }

    @Test
    void aHeartbeatWithoutAnswerForTheLeaseIsALostConnection() {
      Steps steps = Steps.exposing(Lab.map("survey")).unansweredHeartbeats();
      Duration lease = steps.setup().waits().lease();
      steps.later(steps.setup().waits().heartbeatEvery()).wake();
      assertEquals(List.of("Noted"), Commands.stored(steps.later(lease).wake()));
      assertEquals(
          "the connection to the instrument was lost: it answered no heartbeat for PT1M",
          steps.lastEntry(Entry.Noted.class).text());
      assertTrue(steps.state().current().isEmpty());
    }

    @Test
    void anOverdueAnswerIsSealed() {
      Steps steps = Steps.online(Lab.map("survey"));
      assertTrue(steps.state().doing() instanceof Doing.Preparing);
      steps.at(steps.state().doing().due());
      List<Command> commands = steps.wake();
      assertEquals(List.of("Heartbeat", "Commit", "RaiseFence", "Seal"), Commands.kinds(commands));
      assertEquals(
          "the instrument did not answer when it was prepared for survey; the instrument is sealed",
          steps.lastEntry(Entry.Noted.class).text());
    }

    @Test
    void whatTheOldSealingAnswersLateIsNotTakenForTheNewOne() {
      Steps steps = Steps.exposing(Lab.map("survey"));
      long fence = steps.state().link().fence();
      steps.tell(LOST);
      steps.later(steps.setup().waits().reconnectAfter()).wake();
      steps.tell(
          new InstrumentEvent.Sealed(
              new SealReport(fence, Lab.STORE, 0, Map.of(1L, new GrantFate.NeverBegun()))));
      assertEquals(Set.of(1L, 2L), steps.books().unresolved().keySet());
    }
  }

  @Nested
  class WhatASealAnswersIsBooked {
    private final Steps steps = Steps.exposing(Lab.map("survey"));

    private void sealedWith(Map<Long, GrantFate> fates) {
      steps.tell(LOST);
      steps.later(steps.setup().waits().reconnectAfter()).wake();
      steps.tell(Steps.connected("first"));
      steps.sealed(fates);
    }

    @Test
    void whatNeverBeganIsVoid() {
      sealedWith(Map.of(1L, new GrantFate.NeverBegun(), 2L, new GrantFate.NeverBegun()));
      assertEquals(Map.of(), steps.books().unresolved());
      assertEquals(0, steps.upperCoulombs());
    }

    @Test
    void aReceiptIsBookedAndAcknowledgedOnlyThen() {
      steps.tell(LOST);
      steps.later(steps.setup().waits().reconnectAfter()).wake();
      steps.tell(Steps.connected("first"));
      Receipt half = steps.receipt(1, 15, Lab.LINE.multipliedBy(15), Optional.empty());
      Map<Long, GrantFate> fates =
          Map.of(1L, new GrantFate.Reported(half), 2L, new GrantFate.NeverBegun());
      List<Command> commands =
          steps.tell(
              new InstrumentEvent.Sealed(
                  new SealReport(steps.state().link().fence(), Lab.STORE, 0, fates)));
      assertEquals(List.of("GrantBooked", "GrantVoided"), Commands.stored(commands));
      assertEquals(
          List.of("Commit", "Heartbeat", "Acknowledge", "Prepare"), Commands.kinds(commands));
      assertEquals(Lab.UPPER_COULOMBS / 2, steps.upperCoulombs(), 1e-15);
      assertEquals(15, steps.job("survey").done().units(0));
    }

    @Test
    void whatIsUnknownIsPresumedInFull() {
      sealedWith(Map.of(1L, new GrantFate.Unknown(), 2L, new GrantFate.NeverBegun()));
      assertEquals(GrantState.PRESUMED, steps.books().unresolved().get(1L).state());
      assertEquals(Lab.UPPER_COULOMBS, steps.upperCoulombs(), 1e-15);
    }

    @Test
    void whatASealDoesNotMentionIsPresumedInFull() {
      sealedWith(Map.of(2L, new GrantFate.NeverBegun()));
      assertEquals(GrantState.PRESUMED, steps.books().unresolved().get(1L).state());
      assertEquals(Lab.UPPER_COULOMBS, steps.upperCoulombs(), 1e-15);
    }

    @Test
    void whatIsPresumedIsAskedAboutAgainUntilTheAdapterCanProveLess() {
      sealedWith(Map.of(2L, new GrantFate.NeverBegun()));
      Receipt half = steps.receipt(1, 15, Lab.LINE.multipliedBy(15), Optional.empty());
      sealedWith(Map.of(1L, new GrantFate.Reported(half)));
      assertEquals(Map.of(), steps.books().unresolved());
      assertEquals(Lab.UPPER_COULOMBS / 2, steps.upperCoulombs(), 1e-15);
    }
  }

  @Nested
  class AnInstrumentOfAnotherStoreIsTakenOverOnlyWhenApproved {
    private final Steps steps = Steps.begun();

    @Test
    void anotherStoresInstrumentWaitsForAPerson() {
      steps.wake();
      steps.tell(Steps.connected("first"));
      steps.tell(new InstrumentEvent.SealRefused(7, "another-store"));
      assertEquals(List.of(), steps.later(Duration.ofHours(1)).wake());
      assertEquals(
          "the instrument is bound to another store, another-store;"
              + " approve hand-over to take it over",
          steps.state().standingBy());
      steps.ask(new Event.Wish.Approve(Entry.Approved.HAND_OVER, "the old store is gone"));
      assertEquals(Link.Phase.CONNECTING, steps.state().link().phase());
      List<Command> commands = steps.tell(Steps.connected("first"));
      assertTrue(Commands.only(Command.Seal.class, commands).handOver());
    }

    @Test
    void anOlderCopyOfTheStoreIsNoticedByTheInstrumentsFence() {
      steps.wake();
      steps.tell(Steps.connected("first"));
      steps.tell(new InstrumentEvent.SealRefused(70, Lab.STORE));
      assertEquals(
          "the instrument has seen fencing number 70 of this store, which is ahead of the store's"
              + " own: the store is an older copy; approve hand-over to take it over",
          steps.state().standingBy());
    }
  }

  @Test
  void anInstrumentThatGuaranteesLessThanItsProfileStopsTheNight() {
    Steps steps = Steps.begun();
    steps.wake();
    var told = Lab.abilities();
    var weaker =
        new Abilities(
            told.instrument(),
            told.stage(),
            told.field(),
            told.column(),
            new CurrentMeter(
                0.03, new Current(0), 0.2, Duration.ofHours(1), Duration.ofSeconds(20)),
            told.blanker(),
            told.filters(),
            told.filterChange(),
            told.modes(),
            told.probes());
    steps.tell(new InstrumentEvent.Connected(weaker, "first", Steps.parked()));
    assertEquals(
        Optional.of(
            "the instrument guarantees less than its profile for its current drift; correct the"
                + " profile and start again"),
        steps.books().stopped());
  }
}
