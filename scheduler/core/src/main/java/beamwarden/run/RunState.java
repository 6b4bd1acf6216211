package beamwarden.run;

import beamwarden.instrument.StopWhen;
import beamwarden.ledger.Books;
import beamwarden.ledger.Entry;
import java.util.List;
import java.util.Optional;
import java.util.Set;

/**
 * Everything a run knows between two events. Immutable.
 *
 * @param books what is on disk
 * @param link how it stands with the instrument
 * @param view what is known of the instrument's condition
 * @param beat the heartbeats
 * @param doing what the instrument was asked to do between exposures
 * @param current the grant that is exposing, or about to
 * @param next the grant that is stored for when {@code current} has ended
 * @param storing what the commit under way stores; empty when none is
 * @param answers answers to give when it is stored
 * @param toAcknowledge receipts booked and not yet acknowledged
 * @param requests the number of the last request
 * @param stopWish how soon a person wants the exposure to end, if one does
 * @param halted why everything stopped for good, if it did
 * @param standingBy why nothing is exposed just now, for people; empty while something is
 */
public record RunState(
    Books books,
    Link link,
    View view,
    Beat beat,
    Doing doing,
    Optional<Slot> current,
    Optional<Slot> next,
    List<Entry> storing,
    List<Command.Answer> answers,
    Set<Long> toAcknowledge,
    long requests,
    Optional<StopWhen> stopWish,
    Optional<String> halted,
    String standingBy) {
  /** Copies the collections. */
  public RunState {
    storing = List.copyOf(storing);
    answers = List.copyOf(answers);
    toAcknowledge = Set.copyOf(toAcknowledge);
  }

  /** What the instrument is doing, as people see it. */
  public InstrumentState instrument() {
    return InstrumentState.of(this);
  }

  /** The exposure that is being made, if one is. */
  public Optional<Exposing> exposing() {
    return current.filter(Slot::sentOut).map(slot -> new Exposing(slot.opened(), slot.unitsDone()));
  }

  /** The same, with everything stopped for good. */
  RunState haltedBecause(String reason) {
    return new RunState(
        books,
        link,
        view,
        beat,
        doing,
        Optional.empty(),
        Optional.empty(),
        List.of(),
        answers,
        toAcknowledge,
        requests,
        stopWish,
        Optional.of(reason),
        reason);
  }
}
