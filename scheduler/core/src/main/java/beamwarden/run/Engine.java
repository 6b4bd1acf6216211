package beamwarden.run;

import beamwarden.instrument.Instrument;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.StopWhen;
import beamwarden.ledger.Books;
import beamwarden.ledger.Entry;
import beamwarden.ledger.GrantRecord;
import beamwarden.ledger.GrantState;
import beamwarden.ledger.Journal;
import beamwarden.ledger.JournalException;
import beamwarden.ledger.Recorded;
import java.time.Instant;
import java.time.InstantSource;
import java.util.ArrayDeque;
import java.util.Deque;
import java.util.List;
import java.util.function.Consumer;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/**
 * Carries out what the steps of a {@link Run} want: stores entries, speaks to the instrument.
 *
 * <p>Owned by one thread: every call comes from it. The outcome of a commit is the next event a
 * step sees, before anything else that may have arrived meanwhile.
 */
public final class Engine {
  private static final Logger LOGGER = LoggerFactory.getLogger(Engine.class);

  private final Run run;
  private final Journal journal;
  private final Instrument instrument;
  private final InstantSource time;
  private final Outlet outlet;
  private final Deque<Event> waiting = new ArrayDeque<>();
  private final String name;
  private RunState state;
  private boolean stepping;

  /** What an engine tells the world around it; called on the engine's own thread. */
  public interface Outlet {
    /** An asking is answered. */
    void answered(Command.Answer answer);

    /** Entries are on disk. */
    void recorded(List<Recorded> entries);

    /** A step is over, and this is the state now. */
    void stepped(RunState state, List<Wake> wakes);

    /** Everything has stopped for good. */
    void halted(String reason);

    /** Passes an instrument's event on to the engine's thread. */
    void arrived(InstrumentEvent event);
  }

  /**
   * An engine on a journal and an instrument.
   *
   * @param run the steps
   * @param name the instrument's name, under which its fence is kept
   * @param journal where the books are kept
   * @param instrument the instrument
   * @param time the line of time on which the run lives
   * @param outlet what is told
   */
  public Engine(
      Run run,
      String name,
      Journal journal,
      Instrument instrument,
      InstantSource time,
      Outlet outlet) {
    this.run = run;
    this.name = name;
    this.journal = journal;
    this.instrument = instrument;
    this.time = time;
    this.outlet = outlet;
    long fence = journal.raiseFence(name, time.instant());
    this.state = run.begin(Books.of(journal.read()), fence);
  }

  /** The state after the last step. */
  public RunState state() {
    return state;
  }

  /** Takes one event, and all that follows from it. */
  public void take(Event event) {
    waiting.addLast(event);
    if (stepping) {
      return;
    }
    stepping = true;
    try {
      while (!waiting.isEmpty()) {
        step(waiting.removeFirst());
      }
    } catch (RuntimeException broken) {
      LOGGER.error("a rule of the run is broken", broken);
      failSafe("a rule of the run is broken: " + broken.getMessage());
    } finally {
      stepping = false;
    }
    outlet.stepped(state, run.wakes(state, time.instant()));
  }

  /** Blanks the beam and stops for good: towards less dose. */
  private void failSafe(String reason) {
    waiting.clear();
    state = state.haltedBecause(reason);
    outlet.halted(reason);
    instrument.stop(StopWhen.NOW);
    instrument.windDown();
  }

  private void step(Event event) {
    Instant now = time.instant();
    Run.Step step = run.step(state, now, event);
    state = step.state();
    for (Command command : step.commands()) {
      carryOut(command, now);
    }
  }

  private void carryOut(Command command, Instant now) {
    if (command instanceof Command.Commit commit) {
      commit(commit, now);
    } else if (command instanceof Command.RaiseFence) {
      raiseFence(now);
    } else if (command instanceof Command.Begin begin) {
      begin(begin);
    } else if (command instanceof Command.Answer answer) {
      outlet.answered(answer);
    } else if (command instanceof Command.Halt halt) {
      LOGGER.error("everything stops: {}", halt.reason());
      outlet.halted(halt.reason());
    } else {
      speak(command);
    }
  }

  private void speak(Command command) {
    Consumer<InstrumentEvent> listener = outlet::arrived;
    if (command instanceof Command.Connect) {
      instrument.connect(listener::accept);
    } else if (command instanceof Command.Seal seal) {
      instrument.seal(seal.fence(), journal.store(), seal.grants(), seal.handOver());
    } else if (command instanceof Command.Prepare prepare) {
      instrument.prepare(prepare.request(), prepare.conditions(), prepare.stage());
    } else if (command instanceof Command.Measure measure) {
      instrument.measure(measure.request());
    } else if (command instanceof Command.StopExposure stop) {
      instrument.stop(stop.when());
    } else if (command instanceof Command.Heartbeat heartbeat) {
      instrument.heartbeat(heartbeat.number());
    } else if (command instanceof Command.Acknowledge acknowledge) {
      instrument.acknowledge(acknowledge.grant());
    } else if (command instanceof Command.WindDown) {
      instrument.windDown();
    }
  }

  /** The last guard: a grant that is not on disk as open is never sent, whatever a step says. */
  private void begin(Command.Begin begin) {
    GrantRecord record = state.books().unresolved().get(begin.grant().number());
    boolean stored =
        record != null
            && record.state() == GrantState.OPEN
            && record.opened().exposure().equals(begin.grant().exposure());
    if (!stored) {
      throw new IllegalStateException(
          "grant " + begin.grant().number() + " was about to be sent and is not stored as open");
    }
    instrument.begin(begin.grant());
  }

  private void commit(Command.Commit commit, Instant now) {
    commit.entries().forEach(Engine::log);
    try {
      List<Recorded> recorded = journal.commit(state.link().fence(), now, commit.entries());
      waiting.addFirst(new Event.Committed(recorded));
      outlet.recorded(recorded);
    } catch (JournalException failure) {
      LOGGER.error("the books could not be written", failure);
      waiting.addFirst(new Event.CommitFailed(failure.getMessage()));
    }
  }

  private void raiseFence(Instant now) {
    try {
      long fence = journal.raiseFence(name, now);
      waiting.addFirst(new Event.FenceRaised(fence));
    } catch (JournalException failure) {
      LOGGER.error("the fence could not be raised", failure);
      waiting.addFirst(new Event.CommitFailed(failure.getMessage()));
    }
  }

  private static void log(Entry entry) {
    if (entry instanceof Entry.Noted noted) {
      LOGGER.info("{}: {}", noted.what(), noted.text());
    } else if (entry instanceof Entry.JobChanged changed) {
      LOGGER.info("job={} state={} {}", changed.job(), changed.state().text(), changed.because());
    } else {
      LOGGER.debug("{}", entry);
    }
  }
}
