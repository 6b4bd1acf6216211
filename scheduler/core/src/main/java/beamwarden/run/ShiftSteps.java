package beamwarden.run;

import beamwarden.instrument.Readings;
import beamwarden.ledger.Entry.Noted.What;
import beamwarden.ledger.JobRecord;
import beamwarden.queue.JobState;
import beamwarden.shift.Shift;
import java.time.Instant;
import java.util.Optional;

/** What the shifts ask for: opening, wind-down before the close, standing by between them. */
final class ShiftSteps {
  private final RunSetup setup;

  ShiftSteps(RunSetup setup) {
    this.setup = setup;
  }

  /** Notes that a shift opened or closed; true when it did. */
  boolean notes(Turn turn, Optional<Shift> shift) {
    Optional<String> now = shift.map(ShiftSteps::text);
    Optional<String> noted = turn.books.openShift();
    if (now.equals(noted)) {
      return false;
    }
    noted.ifPresent(text -> close(turn, text));
    now.ifPresent(text -> turn.note(What.SHIFT_OPENED, text));
    return true;
  }

  private static void close(Turn turn, String text) {
    turn.note(What.SHIFT_CLOSED, text);
    for (JobRecord record : turn.books.jobs(JobState.RUNNING)) {
      JobSteps.change(turn, record, JobState.WAITING, "the shift closed");
    }
  }

  private static String text(Shift shift) {
    return "shift from " + shift.opens() + " to " + shift.closes();
  }

  /** Why nothing may be exposed now, or empty. */
  Optional<String> closed(Turn turn, Optional<Shift> shift) {
    if (turn.now.isBefore(turn.books.lastAt())) {
      return Optional.of(
          "the clock shows "
              + turn.now
              + ", before the last entry of "
              + turn.books.lastAt()
              + "; set the clock");
    }
    if (turn.books.stopped().isPresent()) {
      return turn.books.stopped();
    }
    if (shift.isEmpty()) {
      return Optional.of(
          setup
              .calendar()
              .next(turn.now)
              .map(next -> "no shift; the next one opens at " + next.opens())
              .orElse("no shift, and none is coming"));
    }
    if (!turn.now.isBefore(shift.get().usableEnd())) {
      return Optional.of("the shift winds down");
    }
    return Optional.empty();
  }

  /** Parks the instrument when it is not parked yet. */
  void rest(Turn turn, String why) {
    turn.standingBy = why;
    if (!turn.view.parked()) {
      Instant due = turn.now.plus(setup.profile().windDown()).plus(setup.waits().answerWithin());
      turn.doing = new Doing.WindingDown(due);
      turn.send(new Command.WindDown());
    }
  }

  void woundDown(Turn turn, Readings readings) {
    if (!(turn.doing instanceof Doing.WindingDown)) {
      return;
    }
    turn.doing = new Doing.Nothing();
    turn.view = turn.view.woundDown();
    if (!readings.beamBlanked() || !readings.valveClosed()) {
      turn.note(
          What.STOPPED,
          "the instrument was wound down, and reads back beam blanked "
              + readings.beamBlanked()
              + ", valve closed "
              + readings.valveClosed()
              + "; see to it");
    } else {
      turn.note(What.WOUND_DOWN, "beam blanked, column valve closed: " + turn.standingBy);
    }
  }
}
