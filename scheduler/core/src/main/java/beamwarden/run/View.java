package beamwarden.run;

import beamwarden.beam.Conditions;
import beamwarden.beam.Point;
import beamwarden.instrument.CurrentReading;
import beamwarden.plan.Readiness;
import java.time.Instant;
import java.util.Optional;

/**
 * What is known of the instrument's condition since it was last sealed.
 *
 * @param conditions as last read back; empty when it must be prepared
 * @param stage as last read back
 * @param reading the last current reading under these settings, if any
 * @param readAt when it was taken
 * @param stay the number of the stretch since the stage last moved; parts of one pass within it do
 *     not add at their joins
 * @param parked whether it was wound down since it was last prepared
 */
record View(
    Optional<Conditions> conditions,
    Optional<Point> stage,
    Optional<CurrentReading> reading,
    Instant readAt,
    long stay,
    boolean parked) {
  static final View NOTHING =
      new View(Optional.empty(), Optional.empty(), Optional.empty(), Instant.MIN, 0, false);

  /** What the instrument is ready for. */
  Readiness readiness() {
    return new Readiness(conditions, stage, reading.map(CurrentReading::settings), readAt);
  }

  View prepared(Conditions now, Point at, long newStay) {
    boolean sameBeam = conditions.map(Conditions::beam).equals(Optional.of(now.beam()));
    return new View(
        Optional.of(now),
        Optional.of(at),
        sameBeam ? reading : Optional.empty(),
        sameBeam ? readAt : Instant.MIN,
        newStay,
        false);
  }

  View unprepared() {
    return new View(Optional.empty(), stage, reading, readAt, stay, parked);
  }

  /** The stage may have moved to the cup and back: a new stretch begins. */
  View measured(CurrentReading now, Instant at, long newStay) {
    return new View(conditions, stage, Optional.of(now), at, newStay, parked);
  }

  View woundDown() {
    return new View(Optional.empty(), stage, Optional.empty(), Instant.MIN, stay, true);
  }
}
