package beamwarden.kit;

import beamwarden.beam.Exposure;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.Grant;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.InstrumentEvent.Ended;
import beamwarden.instrument.InstrumentEvent.Lost;
import beamwarden.instrument.Receipt;
import java.time.Duration;
import java.time.Instant;

/** P7 to P9: what an adapter does when nobody is there, too late, or not entitled. */
final class StartingPromises {
  private static final int LEASE_BEATS = 16;

  private StartingPromises() {}

  static void p07(Trial trial) {
    Exposure exposure = trial.exposures().ofLines(5 * LEASE_BEATS / Exposures.LINE_BEATS);
    Duration lease = trial.beats(LEASE_BEATS);
    trial.ready(exposure);
    Grant grant = trial.begun(trial.draft(exposure).lease(lease));
    Instant seen = renewed(trial, grant);
    Receipt receipt = trial.awaitEnded(grant).event().receipt();
    trial.require(
        receipt.fault().map(f -> f.kind() == FaultKind.LEASE_ENDED).orElse(false),
        "without a heartbeat an exposure ended with " + receipt.fault());
    trial.evidence().dark(grant, seen.plus(lease).plus(trial.beats(1)), "its lease had ended");
    alone(trial);
  }

  /** Keeps a lease alive beyond its length, and tells when the last heartbeat was seen. */
  private static Instant renewed(Trial trial, Grant grant) {
    Instant seen = trial.now();
    for (int beat = 0; beat < 3 * LEASE_BEATS / 2; beat += 2) {
      trial.pass(trial.beats(2));
      seen = trial.heartbeat().at();
    }
    trial.require(
        trial
            .recorder()
            .first(0, Ended.class, e -> e.receipt().grant() == grant.number())
            .isEmpty(),
        "an exposure whose lease was renewed in time has ended");
    return seen;
  }

  /** Nobody can renew this lease: it ends while the connection is lost. */
  private static void alone(Trial trial) {
    Exposure exposure = trial.exposures().ofLines(5);
    Duration lease = exposure.scan().duration().multipliedBy(3).dividedBy(4);
    if (!trial.verdict().provoked(trial.rig().connectionBreaks(), "a lost connection")) {
      return;
    }
    trial.restart();
    trial.seal();
    trial.prepare(exposure);
    int mark = trial.recorder().mark();
    Draft draft = trial.draft(exposure).lease(lease);
    Instant seen = trial.now();
    Grant grant = trial.begun(draft);
    trial.await(mark, Lost.class, e -> true);
    trial.pass(exposure.scan().duration());
    trial.connect();
    GrantFate fate = trial.fate(grant);
    trial.evidence().dark(grant, seen.plus(lease).plus(trial.beats(1)), "its lease ended unheard");
    trial.require(
        !(fate instanceof GrantFate.NeverBegun),
        "an exposure that ran without a connection was said never to have begun");
  }

  static void p08(Trial trial) {
    Exposure exposure = trial.exposures().ofLines(5);
    trial.ready(exposure);
    Duration soon = trial.beats(6);
    Draft late = trial.draft(exposure).latestStart(soon);
    trial.pass(soon.plus(trial.beats(1)));
    trial.refuses(late, "its latest start had passed");
    trial.refuses(
        trial.draft(exposure).heartbeat(trial.heartbeatNumber() + 1000),
        "its heartbeat was never seen");
    Grant running = trial.begun(trial.draft(exposure));
    Grant waiting = trial.draft(exposure).latestStart(soon).grant();
    trial.instrument().begin(waiting);
    trial.awaitEnded(running);
    trial.pass(trial.beats(20));
    trial.staysRefused(waiting, "its latest start passed while another exposure ran");
    long before = trial.heartbeatNumber();
    trial.restart();
    trial.seal();
    trial.prepare(exposure);
    trial.refuses(
        trial.draft(exposure).heartbeat(before), "its heartbeat came before a new connection");
  }

  static void p09(Trial trial) {
    Exposure exposure = trial.exposures().shortOne();
    trial.connect();
    trial.tryToPrepare(exposure);
    trial.refuses(trial.draft(exposure), "nobody has sealed yet");
    trial.seal();
    trial.seal();
    trial.prepare(exposure);
    trial.refuses(trial.draft(exposure).fence(trial.fence() - 1), "its fence is lower");
    trial.refuses(trial.draft(exposure).store(Trial.OTHER_STORE), "it is of another store");
    trial.refuses(
        trial.draft(exposure).session(trial.session() + "-before"), "it is of another session");
    trial.exposed(exposure);
    trial.restart();
    trial.tryToPrepare(exposure);
    trial.refuses(trial.draft(exposure), "nobody has sealed since the adapter was connected");
  }
}
