package beamwarden.run;

import beamwarden.instrument.Instrument;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.ledger.Journal;
import beamwarden.ledger.Recorded;
import beamwarden.timing.Timeline;
import beamwarden.timing.VirtualTime;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * A run in virtual time: the whole night in the time that its steps take.
 *
 * <p>Owned by one thread, the one that moves the time.
 */
public final class Rehearsal implements Engine.Outlet {
  private final VirtualTime time;
  private final Engine engine;
  private final List<Recorded> recorded;
  private final Map<Long, Optional<String>> answers = new HashMap<>();
  private Optional<Timeline.Waiting> wake = Optional.empty();
  private long askings;
  private boolean abandoned;

  /** Opens the books and takes the instrument; the first step comes with {@link #start}. */
  public Rehearsal(
      RunSetup setup, String name, Journal journal, Instrument instrument, VirtualTime time) {
    this.time = time;
    this.recorded = new ArrayList<>(journal.read());
    this.engine = new Engine(new Run(setup), name, journal, instrument, time, this);
  }

  /** Makes the first step. */
  public void start() {
    engine.take(new Event.Woken());
  }

  /**
   * Asks for something, as a person would.
   *
   * @return the refusal, or empty when it was done
   */
  public Optional<String> ask(Event.Wish wish) {
    askings++;
    engine.take(new Event.Asked(askings, wish));
    return answers.remove(askings);
  }

  /** Moves time on until the next thing happens; false when nothing ever will. */
  public boolean advance() {
    return time.runNext();
  }

  /** Moves time on until every job has ended or is held, or the time has come. */
  public void runUntilDone(Instant latest) {
    while (time.instant().isBefore(latest) && !atRest()) {
      if (!advance()) {
        return;
      }
    }
  }

  private boolean atRest() {
    RunState now = state();
    boolean waitsForPeople =
        now.books().jobs().stream()
            .allMatch(job -> job.state().ended() || job.heldFor().isPresent());
    boolean parked = now.view().parked() && now.doing() instanceof Doing.Nothing;
    return now.halted().isPresent()
        || (parked && (waitsForPeople || now.books().stopped().isPresent()));
  }

  /** The daemon is gone, as if killed: whatever still arrives is lost. */
  public void abandon() {
    abandoned = true;
    wake.ifPresent(Timeline.Waiting::cancel);
  }

  /** The state after the last step. */
  public RunState state() {
    return engine.state();
  }

  /** All entries recorded so far. */
  public List<Recorded> recorded() {
    return List.copyOf(recorded);
  }

  @Override
  public void answered(Command.Answer answer) {
    answers.put(answer.number(), answer.refusal());
  }

  @Override
  public void recorded(List<Recorded> entries) {
    recorded.addAll(entries);
  }

  @Override
  public void stepped(RunState state, List<Wake> wakes) {
    wake.ifPresent(Timeline.Waiting::cancel);
    wake =
        wakes.stream()
            .map(Wake::at)
            .min(Comparator.naturalOrder())
            .map(at -> time.after(untilThen(at), () -> take(new Event.Woken())));
  }

  private Duration untilThen(Instant at) {
    return Duration.between(time.instant(), at);
  }

  @Override
  public void halted(String reason) {
    wake.ifPresent(Timeline.Waiting::cancel);
  }

  @Override
  public void arrived(InstrumentEvent event) {
    time.after(Duration.ZERO, () -> take(new Event.FromInstrument(event)));
  }

  private void take(Event event) {
    if (!abandoned) {
      engine.take(event);
    }
  }
}
