package beamwarden.run;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.Exposure;
import beamwarden.beam.Point;
import beamwarden.instrument.CurrentReading;
import beamwarden.instrument.Fault;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.Grant;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.Readings;
import beamwarden.instrument.Receipt;
import beamwarden.instrument.SealReport;
import beamwarden.ledger.Books;
import beamwarden.ledger.Entry;
import beamwarden.ledger.JobRecord;
import beamwarden.ledger.MemoryJournal;
import beamwarden.quantity.Current;
import beamwarden.queue.Job;
import beamwarden.queue.Queue;
import beamwarden.queue.Sample;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Deque;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Stream;

/**
 * A run, with its disk, its instrument and its people played by hand, one step at a time.
 *
 * <p>{@link #step} makes one step and nothing else. {@link #take} goes on with what the engine
 * would do by itself: it stores what a step wants stored, raises the fence, and answers heartbeats.
 * Every step is held to the rules of a step: what is stored comes last and alone, and no grant is
 * sent that is not on disk.
 */
final class Steps {
  private final RunSetup setup;
  private final Run run;
  private final MemoryJournal journal;
  private RunState state;
  private Instant now;
  private long askings;
  private boolean heartbeatsAnswered = true;

  private Steps(RunSetup setup, MemoryJournal journal, Instant now) {
    this.setup = setup;
    this.run = new Run(setup);
    this.journal = journal;
    this.now = now;
    long fence = journal.raiseFence("north-room", now);
    this.state = run.begin(Books.of(journal.read()), fence);
  }

  /** A run that has just begun, in the evening of a night without limits. */
  static Steps begun() {
    return begun(Lab.setup(Lab.night()), Lab.EVENING);
  }

  static Steps begun(RunSetup setup, Instant moment) {
    return new Steps(setup, new MemoryJournal(Lab.STORE), moment);
  }

  /** A daemon that begins with the books of this one, which is gone. */
  Steps restarted() {
    return new Steps(setup, journal.reopened(), now);
  }

  /** A run that is online in chamber session {@code first}, and has these jobs. */
  static Steps online(Sample sample, Lab.Wanted... jobs) {
    return begun().goesOnline(sample, jobs);
  }

  Steps goesOnline(Sample sample, Lab.Wanted... jobs) {
    wake();
    tell(connected("first"));
    return submit(sample, jobs).sealed(Map.of());
  }

  static Steps online(Lab.Wanted... jobs) {
    return online(Lab.sample(), jobs);
  }

  /** The same, with the first grant of the first job sent and begun. */
  static Steps exposing(Lab.Wanted... jobs) {
    return online(jobs).exposes();
  }

  /** The first grant is sent, and has begun. */
  Steps exposes() {
    begin();
    return begins(1);
  }

  // --- what moves the run on

  /** One step. */
  List<Command> step(Event event) {
    Run.Step step = run.step(state, now, event);
    state = step.state();
    for (Command command : step.commands()) {
      boolean last = command == step.commands().get(step.commands().size() - 1);
      boolean storing = command instanceof Command.Commit || command instanceof Command.RaiseFence;
      assertTrue(last || !storing, "what is stored comes last: " + step.commands());
      if (command instanceof Command.Begin begin) {
        assertTrue(
            books().unresolved().containsKey(begin.grant().number()), "not on disk: " + begin);
      }
    }
    return step.commands();
  }

  /** One step and what follows from it by itself; all commands, in order. */
  List<Command> take(Event event) {
    Deque<Event> waiting = new ArrayDeque<>(List.of(event));
    List<Command> all = new ArrayList<>();
    while (!waiting.isEmpty()) {
      List<Command> commands = step(waiting.removeFirst());
      follow(commands, waiting);
      all.addAll(commands);
    }
    return all;
  }

  /** As the engine does: the outcome of a commit comes before anything else. */
  private void follow(List<Command> commands, Deque<Event> waiting) {
    for (Command command : commands) {
      if (command instanceof Command.Commit commit) {
        waiting.addFirst(store(commit));
      } else if (command instanceof Command.RaiseFence) {
        waiting.addFirst(new Event.FenceRaised(journal.raiseFence("north-room", now)));
      } else if (command instanceof Command.Heartbeat heartbeat && heartbeatsAnswered) {
        waiting.addLast(
            new Event.FromInstrument(new InstrumentEvent.HeartbeatSeen(heartbeat.number())));
      }
    }
  }

  /** What the disk answers to a commit. */
  Event.Committed store(Command.Commit commit) {
    return new Event.Committed(journal.commit(state.link().fence(), now, commit.entries()));
  }

  List<Command> wake() {
    return take(new Event.Woken());
  }

  List<Command> tell(InstrumentEvent event) {
    return take(new Event.FromInstrument(event));
  }

  /** Asks, and gives the refusal. */
  Optional<String> ask(Event.Wish wish) {
    askings++;
    return take(new Event.Asked(askings, wish)).stream()
        .filter(Command.Answer.class::isInstance)
        .map(command -> ((Command.Answer) command).refusal())
        .findFirst()
        .orElseThrow(() -> new AssertionError("no answer to " + wish));
  }

  Steps later(Duration passed) {
    now = now.plus(passed);
    return this;
  }

  /** Lets time pass as it does, with a heartbeat now and then. */
  Steps passes(Duration time) {
    Instant end = now.plus(time);
    Duration beat = setup.waits().heartbeatEvery();
    while (now.plus(beat).isBefore(end)) {
      later(beat).wake();
    }
    return at(end);
  }

  Steps at(Instant moment) {
    now = moment;
    return this;
  }

  Steps unansweredHeartbeats() {
    heartbeatsAnswered = false;
    return this;
  }

  // --- what the instrument does when all goes well

  static InstrumentEvent.Connected connected(String session) {
    return new InstrumentEvent.Connected(Lab.abilities(), session, parked());
  }

  Steps sealed(Map<Long, GrantFate> fates) {
    tell(new InstrumentEvent.Sealed(new SealReport(state.link().fence(), Lab.STORE, 0, fates)));
    return this;
  }

  static Readings parked() {
    return new Readings(true, true, true, Optional.empty(), new Point(0, 0));
  }

  Steps submit(Sample sample, Lab.Wanted... jobs) {
    List<Job> all = Stream.of(jobs).map(Lab.Wanted::job).toList();
    Event.Wish wish = new Event.Wish.Submit(new Queue("night", List.of(sample), all), "hash");
    assertEquals(Optional.empty(), ask(wish));
    return this;
  }

  /** Answers what the instrument was asked, until it is handed a grant; that grant. */
  Grant begin() {
    return Commands.only(Command.Begin.class, untilBegin()).grant();
  }

  /** The same; all commands on the way. */
  List<Command> untilBegin() {
    List<Command> all = new ArrayList<>(wake());
    while (Commands.of(Command.Begin.class, all).isEmpty()) {
      Optional<InstrumentEvent> answer = answer();
      if (answer.isEmpty()) {
        throw new AssertionError("nothing is asked of the instrument: " + all + " " + state);
      }
      all.addAll(tell(answer.get()));
    }
    return all;
  }

  /** Answers what the instrument was asked, until it measures the current. */
  Steps untilMeasuring() {
    wake();
    while (!(state.doing() instanceof Doing.Measuring)) {
      tell(answer().orElseThrow());
    }
    return this;
  }

  /** The same, until a step wants entries of a kind stored; its commands, not stored yet. */
  List<Command> untilStoring(Class<? extends Entry> kind) {
    Deque<Event> waiting = new ArrayDeque<>(List.of(new Event.Woken()));
    while (true) {
      List<Command> commands = step(waiting.removeFirst());
      if (Commands.stored(commands).contains(kind.getSimpleName())) {
        return commands;
      }
      follow(commands, waiting);
      if (waiting.isEmpty()) {
        waiting.add(new Event.FromInstrument(answer().orElseThrow()));
      }
    }
  }

  /** What an instrument answers that is in order, to what it was asked last. */
  private Optional<InstrumentEvent> answer() {
    if (state.doing() instanceof Doing.Preparing asked) {
      return Optional.of(
          new InstrumentEvent.Prepared(asked.request(), asked.conditions(), asked.stage()));
    } else if (state.doing() instanceof Doing.Measuring asked) {
      return Optional.of(measured(asked.settings().current()));
    } else if (state.doing() instanceof Doing.WindingDown) {
      return Optional.of(new InstrumentEvent.WoundDown(parked()));
    }
    return Optional.empty();
  }

  /** The answer to the reading that is under way. */
  InstrumentEvent.Measured measured(Current current) {
    Doing.Measuring asked = (Doing.Measuring) state.doing();
    return new InstrumentEvent.Measured(
        asked.request(), new CurrentReading(asked.settings(), current));
  }

  Steps begins(long grant) {
    tell(new InstrumentEvent.Begun(grant));
    return this;
  }

  /** Lets the time of a grant pass, and ends it as granted. */
  List<Command> ends(long grant) {
    Exposure exposure = opened(grant).exposure();
    passes(exposure.scan().duration());
    return tell(new InstrumentEvent.Ended(whole(grant)));
  }

  // --- what can be asked of it

  Receipt whole(long grant) {
    Exposure exposure = opened(grant).exposure();
    return receipt(grant, exposure.scan().units(), exposure.scan().beamOn(), Optional.empty());
  }

  /** A receipt for some lines, all of them whole. */
  Receipt receipt(long grant, long units, Duration beamOn, Optional<Fault> fault) {
    return new Receipt(
        grant,
        state.link().fence(),
        units,
        units,
        beamOn,
        Optional.empty(),
        Optional.empty(),
        Map.of(),
        List.of(),
        fault);
  }

  Optional<Fault> fault(FaultKind kind) {
    return Optional.of(new Fault(kind, "something went wrong"));
  }

  Entry.GrantOpened opened(long grant) {
    return entries(Entry.GrantOpened.class).stream()
        .filter(opened -> opened.grant() == grant)
        .findFirst()
        .orElseThrow();
  }

  <T extends Entry> List<T> entries(Class<T> kind) {
    return journal.read().stream()
        .map(recorded -> recorded.entry())
        .filter(kind::isInstance)
        .map(kind::cast)
        .toList();
  }

  <T extends Entry> T lastEntry(Class<T> kind) {
    List<T> all = entries(kind);
    return all.get(all.size() - 1);
  }

  List<Long> voided() {
    return entries(Entry.GrantVoided.class).stream().map(Entry.GrantVoided::grant).toList();
  }

  double upperCoulombs() {
    return books().sample("sst-07").orElseThrow().dose().upper().coulombs();
  }

  JobRecord job(String id) {
    return books().job(id).orElseThrow();
  }

  Books books() {
    return state.books();
  }

  RunState state() {
    return state;
  }

  RunSetup setup() {
    return setup;
  }

  Instant now() {
    return now;
  }
}
