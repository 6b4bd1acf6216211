package beamwarden.run;

import beamwarden.ledger.JobRecord;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/** The moments at which a run must look again, derived afresh from its state each time. */
final class Wakes {
  private final RunSetup setup;

  Wakes(RunSetup setup) {
    this.setup = setup;
  }

  List<Wake> of(RunState state, Instant now) {
    List<Wake> wakes = new ArrayList<>();
    if (state.halted().isPresent()) {
      return wakes;
    }
    shiftWakes(wakes, now);
    linkWakes(wakes, state);
    state.current().ifPresent(slot -> wakes.add(new Wake(slot.due(), Wake.Reason.ANSWER_DUE)));
    wakes.add(new Wake(state.doing().due(), Wake.Reason.ANSWER_DUE));
    state.books().jobs().forEach(record -> jobWakes(wakes, record));
    Instant later = state.books().lastAt();
    if (now.isBefore(later)) {
      wakes.add(new Wake(later, Wake.Reason.RECONNECT));
    }
    wakes.removeIf(wake -> !wake.at().isAfter(now) || wake.at().equals(Instant.MAX));
    return wakes;
  }

  private void shiftWakes(List<Wake> wakes, Instant now) {
    setup
        .calendar()
        .current(now)
        .ifPresent(
            shift -> {
              wakes.add(new Wake(shift.usableEnd(), Wake.Reason.WIND_DOWN));
              wakes.add(new Wake(shift.closes(), Wake.Reason.SHIFT_CLOSES));
            });
    setup
        .calendar()
        .next(now)
        .ifPresent(shift -> wakes.add(new Wake(shift.opens(), Wake.Reason.SHIFT_OPENS)));
  }

  private void linkWakes(List<Wake> wakes, RunState state) {
    Link link = state.link();
    switch (link.phase()) {
      case OFFLINE -> wakes.add(new Wake(link.until(), Wake.Reason.RECONNECT));
      case CONNECTING, SEALING -> wakes.add(new Wake(link.until(), Wake.Reason.ANSWER_DUE));
      case ONLINE -> {
        Beat beat = state.beat();
        if (beat.sent() > 0) {
          wakes.add(
              new Wake(beat.sentAt().plus(setup.waits().heartbeatEvery()), Wake.Reason.HEARTBEAT));
        }
      }
      case FENCING, FOREIGN -> {}
    }
  }

  private static void jobWakes(List<Wake> wakes, JobRecord record) {
    if (record.state().ended()) {
      return;
    }
    Optional<Instant> earliest = record.job().earliest();
    earliest.ifPresent(at -> wakes.add(new Wake(at, Wake.Reason.JOB_DUE)));
    record
        .job()
        .deadline()
        .ifPresent(at -> wakes.add(new Wake(at.plusNanos(1), Wake.Reason.JOB_DUE)));
  }
}
