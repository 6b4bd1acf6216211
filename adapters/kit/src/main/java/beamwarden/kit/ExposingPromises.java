package beamwarden.kit;

import beamwarden.beam.Exposure;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.Grant;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.InstrumentEvent.Begun;
import beamwarden.instrument.InstrumentEvent.Ended;
import beamwarden.instrument.InstrumentEvent.NotBegun;
import beamwarden.instrument.Receipt;
import beamwarden.instrument.StopWhen;
import beamwarden.kit.Recorder.Heard;
import java.time.Duration;
import java.time.Instant;
import java.util.List;
import java.util.Optional;

/** P1 to P6: what an adapter does with a grant. */
final class ExposingPromises {
  /** What a comparison of two computed times forgives, as a part of them. */
  private static final double ROUNDING = 1e-6;

  private ExposingPromises() {}

  static void p01(Trial trial) {
    if (!trial.evidence().isRecorded()) {
      return;
    }
    Exposure exposure = trial.exposures().shortOne();
    trial.ready(exposure);
    trial.exposed(exposure);
    trial.pass(trial.beats(5));
    trial
        .exposures()
        .spot(8)
        .ifPresent(
            spot -> {
              trial.prepare(spot);
              trial.exposed(spot);
            });
    trial.instrument().windDown();
    trial.pass(trial.beats(5));
    trial.evidence().demand(() -> allGranted(trial));
  }

  private static void allGranted(Trial trial) {
    List<Stretch> truth = trial.evidence().all();
    trial.require(!truth.isEmpty(), "the record shows no beam at all, so that it proves nothing");
    truth.forEach(stretch -> granted(trial, stretch));
  }

  private static void granted(Trial trial, Stretch stretch) {
    trial.require(
        stretch.grant().isPresent(), "beam reached the sample without a grant: " + stretch);
    long grant = stretch.grant().getAsLong();
    Optional<Heard<Ended>> ended =
        trial.recorder().first(0, Ended.class, e -> e.receipt().grant() == grant);
    trial.require(
        trial.recorder().first(0, Begun.class, e -> e.grant() == grant).isPresent()
            && ended.isPresent(),
        "beam reached the sample under a grant that did not begin and end: " + stretch);
    trial.require(
        !stretch.ended().isAfter(ended.orElseThrow().at()),
        "the beam was on after its grant had ended: " + stretch);
  }

  static void p02(Trial trial) {
    Exposure exposure = trial.exposures().shortOne();
    trial.ready(exposure);
    Grant first = trial.draft(exposure).grant();
    Grant second = trial.draft(exposure).grant();
    List<Grant> sent = List.of(first, second, first, second);
    sent.forEach(trial.instrument()::begin);
    trial.awaitEnded(first);
    trial.instrument().begin(first);
    trial.awaitEnded(second);
    trial.instrument().acknowledge(first.number());
    trial.instrument().acknowledge(second.number());
    trial.instrument().begin(first);
    Grant third = trial.draft(exposure).grant();
    trial.instrument().begin(third);
    trial.awaitEnded(third);
    trial.instrument().begin(second);
    trial.pass(exposure.scan().duration().plus(trial.beats(5)));
    trial.verdict().requireOrder();
    trial
        .evidence()
        .demand(() -> List.of(first, second, third).forEach(grant -> exposedOnce(trial, grant)));
    List<Instant> ends =
        List.of(first, second, third).stream().map(g -> trial.awaitEnded(g).at()).toList();
    trial.require(
        ends.equals(ends.stream().sorted().toList()), "grants ended in another order than begun");
  }

  private static void exposedOnce(Trial trial, Grant grant) {
    double seconds = trial.evidence().beamOnSeconds(grant);
    trial.require(
        seconds <= seconds(grant.exposure().scan().duration()) * (1 + ROUNDING),
        "a grant that was sent again sent electrons again: " + trial.evidence().under(grant));
  }

  static void p03(Trial trial) {
    Exposure exposure = trial.exposures().ofLines(5);
    trial.ready(exposure);
    Grant atOnce = trial.draft(exposure).grant();
    trial.instrument().begin(atOnce);
    diesAndIsAsked(trial, atOnce);
    trial.prepare(exposure);
    diesAndIsAsked(trial, trial.begun(trial.draft(exposure)));
  }

  private static void diesAndIsAsked(Trial trial, Grant grant) {
    trial.restart();
    GrantFate fate = trial.fate(grant);
    trial.pass(grant.exposure().scan().duration());
    boolean told =
        trial.recorder().first(0, Begun.class, e -> e.grant() == grant.number()).isPresent();
    trial.require(
        !(fate instanceof GrantFate.NeverBegun)
            || (!told && trial.evidence().under(grant).isEmpty()),
        "after a crash, an exposure that had begun was said never to have begun");
  }

  static void p04(Trial trial) {
    if (!trial.evidence().isRecorded()) {
      return;
    }
    trial.connect();
    trial.seal();
    List.of(trial.exposures().raster(5), trial.exposures().spot(20)).stream()
        .flatMap(Optional::stream)
        .forEach(exposure -> cutByItsTime(trial, exposure));
  }

  private static void cutByItsTime(Trial trial, Exposure exposure) {
    Duration half = exposure.scan().beamOn().dividedBy(2);
    trial.prepare(exposure);
    Grant grant = trial.draft(exposure).longestBeamOn(half).grant();
    int mark = trial.recorder().mark();
    trial.instrument().begin(grant);
    InstrumentEvent answer =
        trial
            .await(
                mark,
                InstrumentEvent.class,
                e ->
                    (e instanceof Begun b && b.grant() == grant.number())
                        || (e instanceof NotBegun n && n.grant() == grant.number()))
            .event();
    if (answer instanceof NotBegun refusal) {
      trial
          .verdict()
          .notShown("a grant of too short a time is refused: " + refusal.fault().message());
      return;
    }
    Receipt receipt = trial.awaitEnded(grant).event().receipt();
    trial.evidence().demand(() -> onForNoLonger(trial, grant));
    trial.require(
        !receipt.complete(exposure.scan().units()),
        "a receipt says all is done in half the time it takes");
  }

  private static void onForNoLonger(Trial trial, Grant grant) {
    double seconds = trial.evidence().beamOnSeconds(grant);
    trial.require(
        seconds <= seconds(grant.longestBeamOn()) * (1 + ROUNDING),
        "the beam was on for " + seconds + " s under a grant of " + grant.longestBeamOn());
  }

  static void p05(Trial trial) {
    Exposure exposure = trial.exposures().ofLines(5);
    if (!trial.verdict().provoked(trial.rig().currentRises(), "too high a current")) {
      return;
    }
    trial.restart();
    trial.seal();
    trial.prepare(exposure);
    Grant grant = trial.begun(trial.draft(exposure));
    Receipt receipt = trial.awaitEnded(grant).event().receipt();
    trial.require(
        receipt.fault().map(f -> f.kind() == FaultKind.CURRENT_OUT_OF_BOUNDS).orElse(false),
        "an exposure whose current was out of bounds ended with " + receipt.fault());
    trial.require(
        !receipt.complete(exposure.scan().units()),
        "an exposure whose current was out of bounds went on to its end");
  }

  static void p06(Trial trial) {
    Exposure exposure = trial.exposures().longOne();
    trial.ready(exposure);
    trial
        .exposures()
        .raster(Exposures.LONG_LINES)
        .ifPresent(raster -> atTheNextLine(trial, raster));
    Grant grant = trial.begun(trial.draft(exposure));
    trial.passInto(grant, 0.3);
    Instant asked = trial.now();
    trial.instrument().stop(StopWhen.NOW);
    endsEarly(trial, grant, asked.plus(trial.beats(4)));
  }

  private static void atTheNextLine(Trial trial, Exposure raster) {
    Grant running = trial.begun(trial.draft(raster));
    Grant waiting = trial.draft(raster).grant();
    trial.instrument().begin(waiting);
    trial.passInto(running, 0.25);
    Instant asked = trial.now();
    trial.instrument().stop(StopWhen.AT_BOUNDARY);
    Duration line = raster.scan().duration().dividedBy(raster.scan().units());
    Receipt receipt = endsEarly(trial, running, asked.plus(line).plus(trial.beats(4)));
    trial.require(
        receipt.unitsDone() == receipt.unitsTouched() && receipt.unitsDone() > 0,
        "a stop at the boundary left a line half done: " + receipt);
    trial.pass(trial.beats(20));
    trial.staysRefused(waiting, "it had not started when the stop came");
  }

  private static Receipt endsEarly(Trial trial, Grant grant, Instant latest) {
    Receipt receipt = trial.awaitEnded(grant).event().receipt();
    trial.require(
        !receipt.complete(grant.exposure().scan().units()),
        "an exposure that was asked to stop went on to its end");
    trial.evidence().dark(grant, latest, "it was asked to stop");
    return receipt;
  }

  private static double seconds(Duration time) {
    return time.toNanos() / 1e9;
  }
}
