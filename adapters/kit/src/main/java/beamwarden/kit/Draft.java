package beamwarden.kit;

import beamwarden.beam.Exposure;
import beamwarden.instrument.Grant;
import beamwarden.quantity.Current;
import java.time.Duration;

/** A grant in the making: generous in everything that the test does not set. */
final class Draft {
  private final long number;
  private final Exposure exposure;
  private final Current highestCurrent;
  private String store = Trial.STORE;
  private long fence;
  private String session;
  private long heartbeat;
  private Duration longestBeamOn;
  private Duration latestStart;
  private Duration lease;

  Draft(Trial trial, long number, Exposure exposure) {
    Rig rig = trial.rig();
    Current wished = exposure.conditions().beam().current();
    Duration generous = rig.beat().multipliedBy(2000);
    this.number = number;
    this.exposure = exposure;
    this.highestCurrent = rig.abilities().meter().highest(wished, wished);
    this.fence = trial.fence();
    this.session = trial.session();
    this.heartbeat = trial.heartbeatNumber();
    this.longestBeamOn = exposure.scan().duration().plus(generous);
    this.latestStart = generous;
    this.lease = generous;
  }

  Draft store(String id) {
    store = id;
    return this;
  }

  Draft fence(long value) {
    fence = value;
    return this;
  }

  Draft session(String id) {
    session = id;
    return this;
  }

  Draft heartbeat(long value) {
    heartbeat = value;
    return this;
  }

  Draft longestBeamOn(Duration time) {
    longestBeamOn = time;
    return this;
  }

  Draft latestStart(Duration time) {
    latestStart = time;
    return this;
  }

  Draft lease(Duration time) {
    lease = time;
    return this;
  }

  Grant grant() {
    return new Grant(
        number,
        store,
        fence,
        session,
        exposure,
        longestBeamOn,
        highestCurrent,
        heartbeat,
        latestStart,
        lease,
        "head-" + number);
  }
}
