package beamwarden.kit;

import beamwarden.beam.Exposure;
import beamwarden.instrument.Grant;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.InstrumentEvent.SealRefused;
import beamwarden.instrument.InstrumentEvent.Sealed;
import beamwarden.kit.Recorder.Heard;
import java.util.Map;

/** P10 to P12: what an adapter does on a seal, and what it still knows then. */
final class SealPromises {
  private SealPromises() {}

  static void p10(Trial trial) {
    Exposure exposure = trial.exposures().longOne();
    trial.ready(exposure);
    Grant running = trial.begun(trial.draft(exposure));
    Grant waiting = trial.draft(exposure).grant();
    trial.instrument().begin(waiting);
    trial.passInto(running, 0.3);
    Heard<Sealed> sealed = trial.seal(running.number(), waiting.number());
    trial.pass(trial.beats(20));
    trial.evidence().dark(running, sealed.at(), "the seal had been answered");
    trial.evidence().neverBegan(waiting, "a seal forbade it");
    trial.require(
        !(sealed.event().report().fates().get(running.number()) instanceof GrantFate.NeverBegun),
        "an exposure that a seal ended was said never to have begun");
    long lower = trial.fence() - 1;
    trial.refuses(trial.draft(exposure).fence(lower), "its fence was sealed away");
    trial.restart();
    trial.refuses(trial.draft(exposure).fence(lower), "its fence was sealed away before a crash");
    refusals(trial);
  }

  private static void refusals(Trial trial) {
    long fence = trial.fence();
    isRefused(trial, trial.seal(fence - 1, Trial.STORE, false), "a lower fence");
    isRefused(trial, trial.seal(fence + 1, Trial.OTHER_STORE, false), "another store");
    isRefused(trial, trial.seal(fence - 1, Trial.OTHER_STORE, true), "a lower fence at hand-over");
    InstrumentEvent handedOver = trial.seal(fence + 1, Trial.OTHER_STORE, true).event();
    trial.require(
        handedOver instanceof Sealed sealed
            && sealed.report().fence() == fence + 1
            && sealed.report().store().equals(Trial.OTHER_STORE),
        "an approved hand-over was answered with " + handedOver);
    isRefused(trial, trial.seal(fence + 2, Trial.STORE, false), "the store that was replaced");
  }

  private static void isRefused(Trial trial, Heard<InstrumentEvent> answer, String what) {
    trial.require(
        answer.event() instanceof SealRefused, "a seal was not refused, in spite of " + what);
  }

  static void p11(Trial trial) {
    Exposure exposure = trial.exposures().shortOne();
    trial.ready(exposure);
    Grant done = trial.begun(trial.draft(exposure));
    trial.awaitEnded(done);
    Grant forgotten = trial.begun(trial.draft(exposure));
    trial.awaitEnded(forgotten);
    trial.instrument().acknowledge(forgotten.number());
    Grant refused = trial.draft(exposure).store(Trial.OTHER_STORE).grant();
    trial.instrument().begin(refused);
    Grant unsent = trial.draft(exposure).grant();
    Grant died = trial.begun(trial.draft(trial.exposures().longOne()));
    trial.passInto(died, 0.5);
    trial.restart();
    Map<Long, GrantFate> fates =
        trial
            .seal(
                done.number(), forgotten.number(), refused.number(), unsent.number(), died.number())
            .event()
            .report()
            .fates();
    mayHaveBegun(trial, fates.get(done.number()), "finished");
    mayHaveBegun(trial, fates.get(forgotten.number()), "acknowledged");
    mayHaveBegun(trial, fates.get(died.number()), "under way when the adapter died");
    didNotHappen(trial, fates.get(refused.number()), "refused");
    didNotHappen(trial, fates.get(unsent.number()), "not sent");
    InstrumentEvent toAnother =
        trial.seal(trial.fence() + 1, Trial.OTHER_STORE, true, done.number()).event();
    trial.require(
        !(toAnother instanceof Sealed sealed)
            || !(sealed.report().fates().get(done.number()) instanceof GrantFate.Reported),
        "another store was given the receipt of a grant that is not its own");
  }

  private static void mayHaveBegun(Trial trial, GrantFate fate, String what) {
    trial.require(
        !(fate instanceof GrantFate.NeverBegun),
        "an exposure that was " + what + " was said never to have begun");
  }

  private static void didNotHappen(Trial trial, GrantFate fate, String what) {
    trial.require(
        !(fate instanceof GrantFate.Reported),
        "a receipt was made up for a grant that was " + what);
  }

  static void p12(Trial trial) {
    Exposure exposure = trial.exposures().shortOne();
    trial.ready(exposure);
    Grant grant = trial.begun(trial.draft(exposure));
    GrantFate reported = new GrantFate.Reported(trial.awaitEnded(grant).event().receipt());
    same(trial, reported, trial.fate(grant), "a seal");
    trial.restart();
    same(trial, reported, trial.fate(grant), "a crash and a seal");
  }

  private static void same(Trial trial, GrantFate reported, GrantFate fate, String after) {
    trial.require(
        fate.equals(reported),
        "after " + after + " the receipt was " + fate + " and had been " + reported);
  }
}
