package beamwarden.run;

import beamwarden.instrument.InstrumentEvent;
import beamwarden.ledger.Books;
import beamwarden.shift.Shift;
import java.time.Instant;
import java.util.List;
import java.util.Optional;
import java.util.Set;

/**
 * The run of an instrument's nights as a pure step: state and event in, state and commands out.
 *
 * <p>The same step drives a rehearsal in virtual time, a night at pace, and a real one. It reads no
 * clock and does no I/O; the moment is passed in and never goes back within one process.
 *
 * <p>A step first takes the event in. What it wants to store goes out as one {@link Command.Commit}
 * at its end, whose outcome is the next event; only when nothing is to be stored does the step look
 * for the next thing to do. So every decision rests on books that are on disk.
 *
 * <p>The instrument, as people see it: see {@link InstrumentState}. Jobs: see {@link JobSteps}.
 */
public final class Run {
  private final RunSetup setup;
  private final LinkSteps link;
  private final ShiftSteps shifts;
  private final ExposureSteps exposures;
  private final WorkSteps work;
  private final WishSteps wishes;
  private final Wakes wakes;

  /** A run under a setup. */
  public Run(RunSetup setup) {
    this.setup = setup;
    link = new LinkSteps(setup);
    shifts = new ShiftSteps(setup);
    exposures = new ExposureSteps(setup);
    work = new WorkSteps(setup);
    wishes = new WishSteps(setup);
    wakes = new Wakes(setup);
  }

  /**
   * What a step gives.
   *
   * @param state the new state
   * @param commands what is to be done, in this order
   */
  public record Step(RunState state, List<Command> commands) {
    /** Copies the commands. */
    public Step {
      commands = List.copyOf(commands);
    }
  }

  /**
   * The state in which a daemon starts.
   *
   * @param books what its journal says
   * @param fence the fencing number that it raised first of all
   */
  public RunState begin(Books books, long fence) {
    return new RunState(
        books,
        Link.begin(fence),
        View.NOTHING,
        Beat.NONE,
        new Doing.Nothing(),
        Optional.empty(),
        Optional.empty(),
        List.of(),
        List.of(),
        Set.of(),
        0,
        Optional.empty(),
        Optional.empty(),
        "");
  }

  /** One step. */
  public Step step(RunState state, Instant now, Event event) {
    Turn turn = new Turn(state, now);
    if (state.halted().isPresent()) {
      refuse(turn, event);
      return turn.end();
    }
    take(turn, event);
    if (turn.halted.isEmpty() && !turn.storing()) {
      decide(turn);
    }
    return turn.end();
  }

  private static void refuse(Turn turn, Event event) {
    if (event instanceof Event.Asked asked) {
      turn.answer(asked.number(), turn.halted);
    }
  }

  private void take(Turn turn, Event event) {
    if (event instanceof Event.Committed committed) {
      turn.stored(committed.recorded());
    } else if (event instanceof Event.CommitFailed failed) {
      turn.halt(failed.reason());
    } else if (event instanceof Event.FenceRaised raised) {
      link.fenceRaised(turn, raised);
    } else if (event instanceof Event.FromInstrument told) {
      takeFromInstrument(turn, told.event());
    } else if (event instanceof Event.Asked asked) {
      wishes.take(turn, asked);
    }
  }

  private void takeFromInstrument(Turn turn, InstrumentEvent event) {
    if (event instanceof InstrumentEvent.Connected connected) {
      link.connected(turn, connected);
    } else if (event instanceof InstrumentEvent.Lost lost) {
      link.lost(turn, lost.reason());
    } else if (event instanceof InstrumentEvent.Sealed sealed) {
      link.sealed(turn, sealed.report());
    } else if (event instanceof InstrumentEvent.SealRefused refused) {
      link.sealRefused(turn, refused);
    } else if (turn.link.online()) {
      takeOnline(turn, event);
    }
  }

  private void takeOnline(Turn turn, InstrumentEvent event) {
    if (event instanceof InstrumentEvent.Prepared prepared) {
      work.prepared(turn, prepared);
    } else if (event instanceof InstrumentEvent.NotPrepared refused) {
      work.notPrepared(turn, refused);
    } else if (event instanceof InstrumentEvent.Measured measured) {
      work.measured(turn, measured);
    } else if (event instanceof InstrumentEvent.NotMeasured refused) {
      work.notMeasured(turn, refused);
    } else if (event instanceof InstrumentEvent.HeartbeatSeen seen) {
      turn.beat = turn.beat.answered(seen.number(), turn.now);
    } else if (event instanceof InstrumentEvent.WoundDown wound) {
      shifts.woundDown(turn, wound.readings());
    } else {
      takeOfExposure(turn, event);
    }
  }

  private void takeOfExposure(Turn turn, InstrumentEvent event) {
    if (event instanceof InstrumentEvent.Begun begun) {
      exposures.begun(turn, begun.grant());
    } else if (event instanceof InstrumentEvent.NotBegun refused) {
      exposures.notBegun(turn, refused);
    } else if (event instanceof InstrumentEvent.Progress progress) {
      exposures.progress(turn, progress);
    } else if (event instanceof InstrumentEvent.Ended ended) {
      exposures.ended(turn, ended.receipt());
    } else if (event instanceof InstrumentEvent.Trouble trouble) {
      exposures.trouble(turn, trouble.fault());
    }
  }

  private void decide(Turn turn) {
    Optional<Shift> shift = setup.calendar().current(turn.now);
    if (shifts.notes(turn, shift) || !link.decide(turn)) {
      return;
    }
    if (!turn.now.isBefore(turn.doing.due())) {
      link.sealAgain(turn, "the instrument did not answer " + describe(turn.doing));
      return;
    }
    if (!exposures.decide(turn, shift)) {
      if (turn.current.isPresent() && !turn.storing()) {
        shift.ifPresent(open -> work.lookAhead(turn, open));
      }
      return;
    }
    if (turn.doing instanceof Doing.Nothing) {
      chooseWork(turn, shift);
    }
  }

  private void chooseWork(Turn turn, Optional<Shift> shift) {
    Optional<String> closed = shifts.closed(turn, shift);
    if (closed.isPresent()) {
      shifts.rest(turn, closed.get());
    } else if (!work.decide(turn, shift.orElseThrow())) {
      shifts.rest(turn, "nothing is left that could be exposed in this shift");
    }
  }

  private static String describe(Doing doing) {
    if (doing instanceof Doing.Preparing preparing) {
      return "when it was prepared for " + preparing.job();
    }
    return doing instanceof Doing.Measuring ? "when the current was measured" : "the wind-down";
  }

  /** When this run wants to be woken next, and why; every moment only once. */
  public List<Wake> wakes(RunState state, Instant now) {
    return wakes.of(state, now);
  }
}
