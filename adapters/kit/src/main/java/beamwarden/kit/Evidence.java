package beamwarden.kit;

import beamwarden.instrument.Grant;
import beamwarden.instrument.InstrumentEvent.Begun;
import beamwarden.instrument.InstrumentEvent.NotBegun;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.OptionalLong;

/** What is known of a grant besides the adapter's answers: the record of what was delivered. */
final class Evidence {
  private final Rig rig;
  private final Recorder recorder;
  private final Verdict verdict;
  private final List<Runnable> demands = new ArrayList<>();

  Evidence(Rig rig, Recorder recorder, Verdict verdict) {
    this.rig = rig;
    this.recorder = recorder;
    this.verdict = verdict;
  }

  /** Whether there is a record; that there is none is reported. */
  boolean isRecorded() {
    if (rig.truth().isEmpty()) {
      verdict.notShown("there is no independent record of what was delivered");
    }
    return rig.truth().isPresent();
  }

  /** Everything in the record; nothing when there is none. */
  List<Stretch> all() {
    return rig.truth().orElse(List.of());
  }

  /** The stretches under a grant; none when there is no record. */
  List<Stretch> under(Grant grant) {
    OptionalLong number = OptionalLong.of(grant.number());
    return all().stream().filter(stretch -> stretch.grant().equals(number)).toList();
  }

  /** For how long the beam was on under a grant at the least, in seconds. */
  double beamOnSeconds(Grant grant) {
    return under(grant).stream().mapToDouble(Stretch::beamOnSeconds).sum();
  }

  /** Whether the adapter has told that a grant began. */
  boolean toldBegun(Grant grant) {
    return recorder.first(0, Begun.class, e -> e.grant() == grant.number()).isPresent();
  }

  /** Whether the adapter has told that a grant was refused. */
  boolean toldRefused(Grant grant) {
    return recorder.first(0, NotBegun.class, e -> e.grant() == grant.number()).isPresent();
  }

  /** Fails when a grant has begun or sent an electron, by now or by the end of the trial. */
  void neverBegan(Grant grant, String because) {
    demand(() -> requireNeverBegun(grant, because));
  }

  private void requireNeverBegun(Grant grant, String because) {
    verdict.require(!toldBegun(grant), "a grant began that must not (" + because + ")");
    verdict.require(
        under(grant).isEmpty(),
        "electrons were sent under a grant that must not (" + because + ")");
  }

  /**
   * Fails when the record shows beam under a grant after a moment, by now or by the end of the
   * trial.
   */
  void dark(Grant grant, Instant after, String because) {
    demand(() -> requireDark(grant, after, because));
  }

  /** Ends the adapter and looks at everything again: beam that was on all the time shows now. */
  void lookAgain() {
    if (rig.truth().isPresent()) {
      rig.endInOrder();
      rig.time().pass(rig.beat());
    }
    demands.forEach(Runnable::run);
  }

  /** Fails unless something holds, now and at the end of the trial. */
  void demand(Runnable demand) {
    demand.run();
    demands.add(demand);
  }

  private void requireDark(Grant grant, Instant after, String because) {
    for (Stretch stretch : under(grant)) {
      verdict.require(
          !stretch.ended().isAfter(after),
          "the beam was on until %s and should have been off by %s (%s)"
              .formatted(stretch.ended(), after, because));
    }
  }
}
