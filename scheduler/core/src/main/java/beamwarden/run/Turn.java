package beamwarden.run;

import beamwarden.instrument.StopWhen;
import beamwarden.ledger.Books;
import beamwarden.ledger.Entry;
import beamwarden.ledger.Recorded;
import java.time.Instant;
import java.util.ArrayList;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;

/**
 * The working copy of one step: begins as a {@link RunState}, ends as another one.
 *
 * <p>Lives on one thread, for one step only.
 */
final class Turn {
  final Instant now;
  Books books;
  Link link;
  View view;
  Beat beat;
  Doing doing;
  Optional<Slot> current;
  Optional<Slot> next;
  long requests;
  Optional<StopWhen> stopWish;
  Optional<String> halted;
  String standingBy;
  final Set<Long> toAcknowledge;
  private final List<Entry> entries = new ArrayList<>();
  private final List<Command.Answer> answers;
  private final List<Command> commands = new ArrayList<>();
  private boolean raising;

  Turn(RunState state, Instant now) {
    this.now = now;
    books = state.books();
    link = state.link();
    view = state.view();
    beat = state.beat();
    doing = state.doing();
    current = state.current();
    next = state.next();
    requests = state.requests();
    stopWish = state.stopWish();
    halted = state.halted();
    standingBy = state.standingBy();
    toAcknowledge = new LinkedHashSet<>(state.toAcknowledge());
    answers = new ArrayList<>(state.answers());
  }

  /** Adds an entry to what this step stores. */
  void write(Entry entry) {
    entries.add(entry);
  }

  /** Notes something that a person should read in the morning. */
  void note(Entry.Noted.What what, String text) {
    write(new Entry.Noted(what, text));
  }

  /** Adds a command; all come before what this step stores. */
  void send(Command command) {
    commands.add(command);
  }

  /** Raises the fence; nothing else may be stored in this step. */
  void raiseFence() {
    raising = true;
    send(new Command.RaiseFence());
  }

  /** Answers a person once what this step stores is on disk; at once when it stores nothing. */
  void answer(long number, Optional<String> refusal) {
    answers.add(new Command.Answer(number, refusal));
  }

  long nextRequest() {
    requests++;
    return requests;
  }

  /** Whether this step stores something, so that everything else must wait for it. */
  boolean storing() {
    return raising || !entries.isEmpty();
  }

  /** Takes in what was stored, and gives the answers that waited for it. */
  void stored(List<Recorded> recorded) {
    books = books.with(recorded);
    current = current.map(slot -> storedSlot(slot, recorded));
    next = next.map(slot -> storedSlot(slot, recorded));
    answers.forEach(this::send);
    answers.clear();
  }

  private static Slot storedSlot(Slot slot, List<Recorded> recorded) {
    for (Recorded one : recorded) {
      if (one.entry().equals(slot.opened())) {
        return slot.stored(one.hash());
      }
    }
    return slot;
  }

  /** Stops everything for good. */
  void halt(String reason) {
    halted = Optional.of(reason);
    entries.clear();
    send(new Command.StopExposure(StopWhen.NOW));
    send(new Command.WindDown());
    send(new Command.Halt(reason));
    answers.forEach(waiting -> send(new Command.Answer(waiting.number(), halted)));
    answers.clear();
  }

  Run.Step end() {
    if (entries.isEmpty() && !raising) {
      answers.forEach(this::send);
      answers.clear();
    } else if (!raising) {
      send(new Command.Commit(entries));
    }
    RunState state =
        new RunState(
            books,
            link,
            view,
            beat,
            doing,
            current,
            next,
            entries,
            answers,
            toAcknowledge,
            requests,
            stopWish,
            halted,
            standingBy);
    return new Run.Step(state, commands);
  }
}
