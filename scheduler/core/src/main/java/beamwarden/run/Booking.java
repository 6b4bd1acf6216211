package beamwarden.run;

import beamwarden.dose.Delivery;
import beamwarden.dose.Receiving;
import beamwarden.instrument.CurrentMeter;
import beamwarden.instrument.CurrentReading;
import beamwarden.instrument.Fault;
import beamwarden.instrument.Receipt;
import beamwarden.ledger.Entry;
import beamwarden.ledger.Entry.Noted.What;
import beamwarden.ledger.GrantRecord;
import beamwarden.profile.Profile;
import beamwarden.quantity.Current;
import beamwarden.queue.JobState;
import java.util.Optional;

/** Turns receipts, readings and faults into entries. */
final class Booking {
  private Booking() {}

  /** Books a receipt that is believed; presumes the grant and stops the night otherwise. */
  static void book(Turn turn, Entry.GrantOpened opened, Receiving outcome, Receipt receipt) {
    if (outcome instanceof Receiving.Believed believed) {
      turn.write(new Entry.GrantBooked(believed.delivered(), receipt));
    } else if (outcome instanceof Receiving.Contradicts contradicts) {
      String why = "grant " + opened.grant() + ": " + contradicts.because();
      turn.write(new Entry.GrantPresumed(contradicts.atMost(), why, Optional.of(receipt)));
      turn.note(What.STOPPED, why + "; the night is stopped, check the instrument");
    }
  }

  /** Does what is to be done about a fault during a job. */
  static void fault(Turn turn, Profile profile, String job, Fault fault) {
    turn.note(What.FAULT, job + ": " + fault.message());
    switch (fault.kind().remedy()) {
      case RETRY_HERE -> giveUpAfterRetries(turn, profile, job, fault);
      case RETRY_AFTER_RECOVERY -> {
        turn.view = turn.view.unprepared();
        giveUpAfterRetries(turn, profile, job, fault);
      }
      case GIVE_UP_JOB -> fail(turn, job, fault.message());
      case STOP_NIGHT -> stopNight(turn, fault);
    }
  }

  /**
   * A fault does not wait for the boundary at which a person wanted to stop; and behind it may be a
   * hand in the chamber.
   */
  static void stopNight(Turn turn, Fault fault) {
    turn.stopWish = Optional.empty();
    turn.link = turn.link.inDoubt();
    if (turn.books.stopped().isEmpty()) {
      turn.note(What.STOPPED, fault.message());
    }
  }

  static void giveUpAfterRetries(Turn turn, Profile profile, String job, Fault fault) {
    int before = turn.books.job(job).map(record -> record.faultsInARow()).orElse(0);
    if (before >= profile.retries()) {
      fail(turn, job, fault.message() + " (tried " + (before + 1) + " times)");
    }
  }

  static void fail(Turn turn, String job, String because) {
    boolean going = turn.books.job(job).filter(record -> !record.state().ended()).isPresent();
    if (going) {
      turn.write(new Entry.JobChanged(job, JobState.FAILED, Optional.empty(), because));
    }
  }

  /**
   * Books a current reading. Within its bounds the guarantees were kept, and what was booked on
   * them stands. Out of them the night stops, and what was booked since the reading before is
   * raised to what the reading says may have flowed.
   */
  static void reading(Turn turn, Profile profile, CurrentReading reading) {
    CurrentMeter meter = profile.abilities().meter();
    Current wished = reading.settings().current();
    Current atMost = meter.highestNow(reading.current());
    boolean left = meter.outOfBounds(wished, reading.current());
    for (GrantRecord record : turn.books.sinceReading().values()) {
      Delivery counted = record.counted();
      boolean sameBeam = counted.exposure().conditions().beam().equals(reading.settings());
      if (left && sameBeam && atMost.compareTo(counted.upperCurrent()) > 0) {
        turn.write(
            new Entry.GrantBooked(
                counted.withUpperCurrent(atMost), record.receipt().orElseThrow()));
      }
    }
    turn.write(new Entry.CurrentMeasured(reading));
    if (left) {
      turn.note(
          What.STOPPED,
          "the probe current reads "
              + reading.current()
              + " where "
              + wished
              + " was set: out of its bounds; check the column");
    }
  }
}
