package beamwarden.run;

import beamwarden.beam.Exposure;
import beamwarden.dose.Deliveries;
import beamwarden.dose.Delivery;
import beamwarden.dose.Receiving;
import beamwarden.estimate.Timings;
import beamwarden.instrument.Fault;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.Grant;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.Receipt;
import beamwarden.instrument.StopWhen;
import beamwarden.ledger.Entry;
import beamwarden.ledger.Entry.Noted.What;
import beamwarden.queue.JobState;
import beamwarden.shift.Shift;
import java.time.Duration;
import java.time.Instant;
import java.util.Comparator;
import java.util.Optional;
import java.util.stream.Stream;

/**
 * The way of a grant: storing → stored → sent → exposing → receipt booked → acknowledged.
 *
 * <p>While one exposes, the next is stored; it is sent when the receipt of the first is in and
 * nothing stands between them. What was stored and never sent is voided at every barrier.
 */
final class ExposureSteps {
  private final RunSetup setup;

  ExposureSteps(RunSetup setup) {
    this.setup = setup;
  }

  /** Looks after the grant on its way; true when there is none and other work may be chosen. */
  boolean decide(Turn turn, Optional<Shift> shift) {
    turn.toAcknowledge.forEach(grant -> turn.send(new Command.Acknowledge(grant)));
    turn.toAcknowledge.clear();
    if (turn.current.isEmpty()) {
      return true;
    }
    Slot slot = turn.current.get();
    turn.standingBy = "";
    if (slot.phase() == Slot.Phase.STORED) {
      send(turn, slot, shift);
    } else if (!turn.now.isBefore(slot.due())) {
      new LinkSteps(setup).sealAgain(turn, "the receipt of grant " + slot.grant() + " is overdue");
    } else {
      stopWhereNeeded(turn, slot, shift);
    }
    return false;
  }

  private void stopWhereNeeded(Turn turn, Slot slot, Optional<Shift> shift) {
    boolean open = shift.filter(now -> turn.now.isBefore(now.usableEnd())).isPresent();
    boolean atOnce = !turn.stopWish.equals(Optional.of(StopWhen.AT_BOUNDARY));
    boolean stopped = turn.books.stopped().isPresent();
    boolean now = (stopped && atOnce) || !open;
    boolean jobMayGoOn =
        turn.books
            .job(slot.opened().exposure().job())
            .filter(job -> job.state() == JobState.RUNNING)
            .isPresent();
    StopWhen when = now ? StopWhen.NOW : StopWhen.AT_BOUNDARY;
    if (slot.stopping(when) || (!now && !stopped && jobMayGoOn)) {
      return;
    }
    turn.current = Optional.of(slot.asStopping(when));
    turn.send(new Command.StopExposure(when));
    voidNext(turn, "the exposure before it was stopped");
  }

  /** Sends a stored grant, or voids it when it could no longer start and end in time. */
  private void send(Turn turn, Slot slot, Optional<Shift> shift) {
    Exposure exposure = slot.opened().exposure();
    Duration takes = Timings.exposure(exposure, setup.profile().abilities());
    Instant latest = latestStart(turn, exposure, shift);
    if (turn.now.isAfter(latest) || !mayExpose(turn, exposure.job())) {
      turn.current = Optional.empty();
      turn.write(Barrier.neverSent(slot, "it could no longer be exposed in time"));
      return;
    }
    Instant within = turn.now.plus(setup.waits().answerWithin());
    Instant limit = within.isBefore(latest) ? within : latest;
    Instant due = limit.plus(takes).plus(setup.waits().answerWithin());
    turn.current = Optional.of(slot.sentAt(turn.now, due));
    turn.send(new Command.Begin(grant(turn, slot, limit)));
  }

  /** So that it ends before the wind-down and its job's deadline; never outside a shift. */
  private Instant latestStart(Turn turn, Exposure exposure, Optional<Shift> shift) {
    Duration takes = Timings.exposure(exposure, setup.profile().abilities());
    Optional<Instant> deadline =
        turn.books.job(exposure.job()).flatMap(record -> record.job().deadline());
    return Stream.of(
            shift.map(open -> open.usableEnd().minus(takes)).or(() -> Optional.of(Instant.MIN)),
            shift.flatMap(Shift::latestStart),
            deadline.map(moment -> moment.minus(takes)))
        .flatMap(Optional::stream)
        .min(Comparator.naturalOrder())
        .orElseThrow();
  }

  private boolean mayExpose(Turn turn, String job) {
    return turn.books.stopped().isEmpty()
        && turn.books.job(job).filter(record -> record.state() == JobState.RUNNING).isPresent();
  }

  /**
   * The latest start is counted from when the heartbeat's answer came: the adapter got it before.
   */
  private Grant grant(Turn turn, Slot slot, Instant limit) {
    Delivery inFull = slot.opened().inFull();
    return new Grant(
        slot.grant(),
        setup.store(),
        turn.link.fence(),
        slot.opened().session(),
        inFull.exposure(),
        slot.opened().longestBeamOn(),
        inFull.upperCurrent(),
        turn.beat.seen(),
        Duration.between(turn.beat.seenAt(), limit),
        setup.waits().lease(),
        slot.chainHead());
  }

  /** Voids what was stored for later and never sent. */
  void voidNext(Turn turn, String because) {
    turn.next.ifPresent(slot -> turn.write(Barrier.neverSent(slot, because)));
    turn.next = Optional.empty();
  }

  void begun(Turn turn, long grant) {
    currentOf(turn, grant).ifPresent(slot -> turn.current = Optional.of(slot.exposing(0)));
  }

  void progress(Turn turn, InstrumentEvent.Progress progress) {
    currentOf(turn, progress.grant())
        .ifPresent(slot -> turn.current = Optional.of(slot.exposing(progress.unitsDone())));
  }

  void notBegun(Turn turn, InstrumentEvent.NotBegun refused) {
    Optional<Slot> slot = currentOf(turn, refused.grant());
    if (slot.isEmpty()) {
      return;
    }
    turn.current = Optional.empty();
    voidNext(turn, "the grant before it was refused");
    turn.view = turn.view.unprepared();
    if (slot.get().phase() == Slot.Phase.EXPOSING) {
      presumeBegun(turn, slot.get());
    } else {
      voidRefused(turn, slot.get(), refused.fault());
    }
  }

  private void voidRefused(Turn turn, Slot slot, Fault fault) {
    Entry.GrantOpened opened = slot.opened();
    turn.write(
        new Entry.GrantVoided(slot.grant(), opened.chain(), !slot.stopping(), fault.message()));
    if (!slot.stopping()) {
      Booking.fault(turn, setup.profile(), opened.exposure().job(), fault);
    }
  }

  /** What was said to have begun is not void because it is said not to have. */
  private static void presumeBegun(Turn turn, Slot slot) {
    String why = "grant " + slot.grant() + " was said to have begun, and then not to have";
    turn.write(new Entry.GrantPresumed(slot.opened().inFull(), why, Optional.empty()));
    turn.note(What.STOPPED, why + "; the night is stopped, check the instrument");
  }

  void ended(Turn turn, Receipt receipt) {
    Optional<Slot> slot = currentOf(turn, receipt.grant());
    if (slot.isEmpty()) {
      return;
    }
    Entry.GrantOpened opened = slot.get().opened();
    Receiving outcome = judge(turn, slot.get(), receipt);
    turn.current = Optional.empty();
    Booking.book(turn, opened, outcome, receipt);
    turn.toAcknowledge.add(receipt.grant());
    receipt
        .fault()
        .ifPresent(fault -> Booking.fault(turn, setup.profile(), opened.exposure().job(), fault));
    boolean asGranted =
        outcome instanceof Receiving.Believed
            && receipt.fault().isEmpty()
            && receipt.complete(opened.exposure().scan().units())
            && !slot.get().stopping()
            && !CountRule.reached(turn.books, opened.exposure(), receipt);
    if (asGranted) {
      turn.current = turn.next;
      turn.next = Optional.empty();
      sendAtOnce(turn);
    } else {
      voidNext(turn, "the exposure before it did not end as granted");
    }
  }

  /** The next grant is on disk already: the instrument need not wait for this receipt to be. */
  private void sendAtOnce(Turn turn) {
    Optional<Slot> slot = turn.current;
    if (slot.isEmpty() || slot.get().phase() != Slot.Phase.STORED) {
      return;
    }
    send(turn, slot.get(), setup.calendar().current(turn.now));
  }

  /**
   * What the dose rules say of a receipt, and what only the run knows: how much time has passed.
   */
  private Receiving judge(Turn turn, Slot slot, Receipt receipt) {
    Delivery inFull = slot.opened().inFull();
    Receiving outcome = Deliveries.received(inFull, receipt, setup.profile().abilities().meter());
    if (receipt.fence() != turn.link.fence()) {
      return new Receiving.Contradicts(
          "its receipt has fencing number " + receipt.fence() + ", not " + turn.link.fence(),
          inFull);
    }
    Duration passed = Duration.between(slot.sent(), turn.now);
    Duration slack = inFull.tolerances().blanking().plus(CLOCK_SLACK);
    if (receipt.beamOn().compareTo(passed.plus(slack)) <= 0) {
      return outcome;
    }
    return new Receiving.Contradicts(
        "its receipt tells of " + receipt.beamOn() + " of beam after " + passed,
        outcome instanceof Receiving.Contradicts higher ? higher.atMost() : inFull);
  }

  /** How far two processes' clocks may come apart within one exposure. */
  private static final Duration CLOCK_SLACK = Duration.ofMillis(100);

  void trouble(Turn turn, Fault fault) {
    turn.note(What.FAULT, fault.message());
    if (fault.kind().remedy() == FaultKind.Remedy.STOP_NIGHT) {
      Booking.stopNight(turn, fault);
    }
    turn.view = turn.view.unprepared();
  }

  private static Optional<Slot> currentOf(Turn turn, long grant) {
    return turn.current.filter(slot -> slot.grant() == grant && slot.sentOut());
  }
}
