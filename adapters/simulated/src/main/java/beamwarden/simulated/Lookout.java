package beamwarden.simulated;

import beamwarden.instrument.Fault;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.Grant;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.quantity.Current;
import java.time.Duration;
import java.time.Instant;
import java.util.Optional;

/** Watches a running exposure: its lease, its current, and how far it is. */
final class Lookout {
  private static final int PROGRESS_EVENTS = 10;
  private static final Duration PROGRESS_EVERY = Duration.ofSeconds(1);
  private static final int LOOKS_AT_THE_CURRENT = 16;

  private final Exposing exposing;
  private final Desk desk;
  private final Hardware hardware;
  private final Grant grant;

  Lookout(Exposing exposing, Desk desk) {
    this.exposing = exposing;
    this.desk = desk;
    this.hardware = desk.hardware();
    this.grant = exposing.grant();
  }

  /** Begins to watch; the scan engine has been started. */
  void start() {
    watchLease();
    watchCurrent();
    tellProgress();
  }

  /** The lease counts from the last heartbeat; a newer one only moves the next look. */
  private void watchLease() {
    long over = desk.heartbeats().last().orElseThrow() + grant.lease().toNanos();
    Duration left = Duration.ofNanos(over - hardware.time().elapsedNanos());
    Instant due = hardware.time().instant().plus(left);
    desk.later(left, () -> lookAtLease(over, due));
  }

  private void lookAtLease(long over, Instant due) {
    if (!exposing.isRunning()) {
      return;
    }
    if (desk.heartbeats().last().orElseThrow() + grant.lease().toNanos() > over) {
      watchLease();
      return;
    }
    exposing.endAt(
        due.plus(exposing.blankingTakes()),
        Optional.of(new Fault(FaultKind.LEASE_ENDED, "no heartbeat came within " + grant.lease())));
  }

  /** Ends the exposure when the monitor shows too much: now, or wherever the drift leads to. */
  void watchCurrent() {
    Instant now = hardware.time().instant();
    Instant from = now.isAfter(exposing.firstElectron()) ? now : exposing.firstElectron();
    long left = Math.max(0, exposing.path().endNanos() - exposing.nanosSinceFirst(from));
    for (int look = 0; look <= LOOKS_AT_THE_CURRENT; look++) {
      Instant at = from.plusNanos(left / LOOKS_AT_THE_CURRENT * look);
      Current shown = hardware.monitored(grant.number(), at);
      if (shown.compareTo(grant.highestCurrent()) > 0) {
        exposing.endAt(at.plus(exposing.reaction()), Optional.of(tooMuch(shown)));
        return;
      }
    }
  }

  private Fault tooMuch(Current shown) {
    return new Fault(
        FaultKind.CURRENT_OUT_OF_BOUNDS,
        "the current of %s is above the %s that grant %d allows"
            .formatted(shown, grant.highestCurrent(), grant.number()));
  }

  private void tellProgress() {
    Duration whole = Duration.ofNanos(exposing.path().endNanos());
    Duration share = whole.dividedBy(PROGRESS_EVENTS);
    Duration every = share.compareTo(PROGRESS_EVERY) > 0 ? share : PROGRESS_EVERY;
    if (whole.compareTo(every) > 0) {
      tellProgressAfter(exposing.ability().frameStart().plus(every), every);
    }
  }

  private void tellProgressAfter(Duration wait, Duration every) {
    desk.later(
        wait,
        () -> {
          if (exposing.isRunning()) {
            long units =
                exposing.path().at(exposing.nanosSinceFirst(hardware.time().instant())).unitsDone();
            desk.say(new InstrumentEvent.Progress(grant.number(), units));
            tellProgressAfter(every, every);
          }
        });
  }
}
