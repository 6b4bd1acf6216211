package beamwarden.run;

import beamwarden.dose.Deliveries;
import beamwarden.dose.Receiving;
import beamwarden.instrument.Fault;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.SealReport;
import beamwarden.ledger.Entry;
import beamwarden.ledger.Entry.Noted.What;
import beamwarden.ledger.GrantRecord;
import beamwarden.ledger.GrantState;
import beamwarden.ledger.JobRecord;
import beamwarden.queue.HeldFor;
import beamwarden.queue.JobState;
import java.time.Instant;
import java.util.Optional;
import java.util.Set;

/**
 * Connecting and sealing: how a run comes to be allowed to send grants.
 *
 * <p>Offline → connecting → fencing → sealing → online. After a lost connection, an answer that
 * does not come, or a receipt that is overdue, it begins again; nothing is sent before the
 * instrument is sealed under a fence that was raised for this very sealing.
 */
final class LinkSteps {
  private final RunSetup setup;

  LinkSteps(RunSetup setup) {
    this.setup = setup;
  }

  /** Moves the connection on; true when the run is online and may go on to other things. */
  boolean decide(Turn turn) {
    Link link = turn.link;
    switch (link.phase()) {
      case OFFLINE -> {
        turn.standingBy =
            "the instrument is not connected" + (link.why().isEmpty() ? "" : ": " + link.why());
        if (!turn.now.isBefore(link.until())) {
          turn.link = link.to(Link.Phase.CONNECTING, answerDue(turn));
          turn.send(new Command.Connect());
        }
      }
      case FENCING -> {
        turn.link = link.to(Link.Phase.SEALING, answerDue(turn));
        turn.raiseFence();
      }
      case CONNECTING, SEALING -> {
        if (!turn.now.isBefore(link.until())) {
          lost(turn, "it did not answer in time");
        }
      }
      case FOREIGN -> {
        if (turn.books.handOverApproved()) {
          turn.link = link.to(Link.Phase.OFFLINE, turn.now);
          return decide(turn);
        }
      }
      case ONLINE -> {
        return !askedAfresh(turn) && keepAlive(turn);
      }
    }
    return false;
  }

  /** Before anything else is exposed, an instrument whose session is in doubt is asked for it. */
  private boolean askedAfresh(Turn turn) {
    if (!turn.link.doubted() || turn.current.isPresent()) {
      return false;
    }
    turn.link = turn.link.to(Link.Phase.CONNECTING, answerDue(turn));
    forget(turn);
    turn.standingBy = "the instrument is asked for its chamber session";
    turn.send(new Command.Connect());
    return true;
  }

  private boolean keepAlive(Turn turn) {
    Beat beat = turn.beat;
    boolean silent =
        beat.sent() > beat.seen()
            && !turn.now.isBefore(
                (beat.answered() ? beat.seenAt() : turn.link.until()).plus(setup.waits().lease()));
    if (silent) {
      lost(turn, "it answered no heartbeat for " + setup.waits().lease());
      return false;
    }
    if (beat.sent() == 0 || !turn.now.isBefore(nextBeat(beat))) {
      turn.beat = beat.next(turn.now);
      turn.send(new Command.Heartbeat(turn.beat.sent()));
    }
    return turn.beat.answered();
  }

  Instant nextBeat(Beat beat) {
    return beat.sentAt().plus(setup.waits().heartbeatEvery());
  }

  private Instant answerDue(Turn turn) {
    return turn.now.plus(setup.waits().answerWithin());
  }

  void connected(Turn turn, InstrumentEvent.Connected connected) {
    if (turn.link.phase() != Link.Phase.CONNECTING) {
      return;
    }
    turn.link = turn.link.reported(connected.session(), turn.now);
    Optional<String> weaker = Guarantees.weaker(setup.profile().abilities(), connected.abilities());
    if (weaker.isPresent() && !turn.books.stopped().equals(weaker)) {
      turn.note(What.STOPPED, weaker.get());
    }
    seeSession(turn, connected.session());
  }

  private static void seeSession(Turn turn, String session) {
    if (turn.books.confirmedSession().isEmpty()) {
      turn.write(new Entry.SessionSeen(session, true));
    } else if (!turn.books.confirmedSession().get().equals(session)
        && !turn.books.unconfirmedSession().equals(Optional.of(session))) {
      turn.write(new Entry.SessionSeen(session, false));
      for (JobRecord job : turn.books.jobs()) {
        if (!job.state().ended() && job.state() != JobState.HELD) {
          turn.write(holdForPlacements(job.job().id()));
        }
      }
    }
  }

  /** Why jobs wait while nobody has confirmed a chamber session. */
  static final String TOUCHED =
      "the chamber was opened, vented or re-homed; confirm holder and placements with approve"
          + " placements";

  static Entry holdForPlacements(String job) {
    return new Entry.JobChanged(job, JobState.HELD, Optional.of(HeldFor.PLACEMENTS), TOUCHED);
  }

  void fenceRaised(Turn turn, Event.FenceRaised raised) {
    Set<Long> asked = turn.books.unresolved().keySet();
    turn.link = turn.link.sealing(raised.fence(), answerDue(turn));
    turn.send(new Command.Seal(raised.fence(), asked, turn.books.handOverApproved()));
  }

  void sealed(Turn turn, SealReport report) {
    if (turn.link.phase() != Link.Phase.SEALING) {
      return;
    }
    if (report.fence() != turn.link.fence() || !report.store().equals(setup.store())) {
      foreign(turn, boundElsewhere(report.fence(), report.store()));
      return;
    }
    if (report.lastBegun() > turn.books.lastGrant() && !turn.books.handOverApproved()) {
      foreign(
          turn,
          "the instrument has begun grant "
              + report.lastBegun()
              + ", and the books know none beyond "
              + turn.books.lastGrant()
              + ": the store is an older copy");
      return;
    }
    skipNumbers(turn, report.lastBegun());
    turn.link = turn.link.to(Link.Phase.ONLINE, turn.now);
    Beat counted = turn.beat;
    forget(turn);
    turn.beat = counted;
    for (GrantRecord record : turn.books.unresolved().values()) {
      resolve(turn, record, report.fates().get(record.opened().grant()));
    }
  }

  private void resolve(Turn turn, GrantRecord record, GrantFate fate) {
    Entry.GrantOpened opened = record.opened();
    if (fate instanceof GrantFate.NeverBegun) {
      turn.write(
          new Entry.GrantVoided(
              opened.grant(), opened.chain(), false, "the sealed instrument never began it"));
    } else if (fate instanceof GrantFate.Reported reported) {
      Receiving outcome =
          Deliveries.received(
              opened.inFull(), reported.receipt(), setup.profile().abilities().meter());
      Booking.book(turn, opened, outcome, reported.receipt());
      turn.toAcknowledge.add(opened.grant());
      reported
          .receipt()
          .fault()
          .ifPresent(fault -> Booking.fault(turn, setup.profile(), opened.exposure().job(), fault));
    } else if (record.state() == GrantState.OPEN) {
      turn.write(
          new Entry.GrantPresumed(
              opened.inFull(),
              "the instrument cannot say what was done under it",
              Optional.empty()));
      Booking.giveUpAfterRetries(turn, setup.profile(), opened.exposure().job(), UNKNOWN);
    }
  }

  private static final Fault UNKNOWN =
      new Fault(FaultKind.OUTCOME_UNKNOWN, "nobody can say what was done under a grant of it");

  void sealRefused(Turn turn, InstrumentEvent.SealRefused refused) {
    if (turn.link.phase() != Link.Phase.SEALING) {
      return;
    }
    if (refused.store().equals(setup.store()) && turn.books.handOverApproved()) {
      turn.link = turn.link.to(Link.Phase.FENCING, turn.now);
    } else {
      foreign(turn, boundElsewhere(refused.fence(), refused.store()));
    }
  }

  private String boundElsewhere(long fence, String store) {
    return store.equals(setup.store())
        ? "the instrument has seen fencing number "
            + fence
            + " of this store, which is ahead of the store's own: the store is an older copy"
        : "the instrument is bound to another store, " + store;
  }

  private static void foreign(Turn turn, String reason) {
    turn.link = turn.link.to(Link.Phase.FOREIGN, turn.now);
    turn.standingBy = reason + "; approve hand-over to take it over";
    turn.note(What.STOPPED, turn.standingBy);
  }

  /** Numbers that a newer copy of the books gave are never given again. */
  private static void skipNumbers(Turn turn, long lastBegun) {
    if (lastBegun > turn.books.lastGrant()) {
      turn.write(
          new Entry.GrantVoided(
              lastBegun,
              Entry.GENERAL,
              false,
              "its number was given by a newer copy of these books"));
    }
  }

  /** The connection is gone, or the instrument cannot be relied upon to answer. */
  void lost(Turn turn, String reason) {
    if (turn.link.phase() == Link.Phase.OFFLINE) {
      return;
    }
    if (turn.link.phase() == Link.Phase.ONLINE) {
      turn.note(What.FAULT, "the connection to the instrument was lost: " + reason);
    }
    turn.link = turn.link.lost(reason, turn.now.plus(setup.waits().reconnectAfter()));
    forget(turn);
  }

  /** What the instrument was asked and told holds no longer. */
  private static void forget(Turn turn) {
    turn.doing = new Doing.Nothing();
    turn.current = Optional.empty();
    turn.next = Optional.empty();
    turn.view = View.NOTHING;
    turn.beat = Beat.NONE;
  }

  /** An answer that had to come did not: seal, and learn what was done. */
  void sealAgain(Turn turn, String reason) {
    turn.note(What.FAULT, reason + "; the instrument is sealed");
    turn.link = turn.link.to(Link.Phase.FENCING, turn.now);
    turn.doing = new Doing.Nothing();
  }
}
