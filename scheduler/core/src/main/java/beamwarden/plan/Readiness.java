package beamwarden.plan;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Conditions;
import beamwarden.beam.Exposure;
import beamwarden.beam.Point;
import beamwarden.estimate.Timings;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Stage;
import java.time.Duration;
import java.time.Instant;
import java.util.Optional;

/**
 * What an instrument is ready for.
 *
 * @param conditions what it is set to; empty when it must be prepared
 * @param stage where the stage is; empty when it is not known
 * @param readFor the beam settings of the last current reading; empty when one must be taken
 * @param readAt when that reading was taken
 */
public record Readiness(
    Optional<Conditions> conditions,
    Optional<Point> stage,
    Optional<BeamSettings> readFor,
    Instant readAt) {
  /** How far a read-back of the stage may be from where it was sent, its repeatability apart. */
  private static final double STAGE_ROUNDING_METRES = 1e-9;

  /** Nothing is set, and the stage stands in the middle of its range. */
  public static Readiness inTheMiddle(Stage stage) {
    Point middle =
        new Point(
            (stage.leftMetres() + stage.rightMetres()) / 2,
            (stage.bottomMetres() + stage.topMetres()) / 2);
    return new Readiness(Optional.empty(), Optional.of(middle), Optional.empty(), Instant.MIN);
  }

  /** The same after a wind-down: the stage stays where it is. */
  public Readiness parked() {
    return new Readiness(Optional.empty(), stage, Optional.empty(), Instant.MIN);
  }

  /** The same after it was prepared for an exposure; a reading holds as long as the beam does. */
  public Readiness preparedFor(Exposure exposure) {
    boolean sameBeam =
        conditions.map(Conditions::beam).equals(Optional.of(exposure.conditions().beam()));
    return new Readiness(
        Optional.of(exposure.conditions()),
        Optional.of(exposure.stageTarget()),
        sameBeam ? readFor : Optional.empty(),
        sameBeam ? readAt : Instant.MIN);
  }

  /** The same after the current was read. */
  public Readiness readAt(BeamSettings settings, Instant at) {
    return new Readiness(conditions, stage, Optional.of(settings), at);
  }

  /** Whether two places of the stage are the same, as near as it repeats. */
  public static boolean samePlace(Point one, Point other, Abilities abilities) {
    return one.distanceMetres(other)
        <= abilities.stage().repeatabilityMetres() + STAGE_ROUNDING_METRES;
  }

  /** Whether it is set to what an exposure needs. */
  public boolean isAt(Exposure exposure, Abilities abilities) {
    return conditions.equals(Optional.of(exposure.conditions()))
        && stage.filter(at -> samePlace(at, exposure.stageTarget(), abilities)).isPresent();
  }

  /** The time to bring it there. */
  public Duration preparation(Exposure exposure, Abilities abilities) {
    return isAt(exposure, abilities)
        ? Duration.ZERO
        : Timings.preparation(
            conditions, stage, exposure.conditions(), exposure.stageTarget(), abilities);
  }

  /** Whether the last reading still holds when an exposure that starts then has ended. */
  public boolean hasReading(Exposure exposure, Instant start, Abilities abilities) {
    if (!readFor.equals(Optional.of(exposure.conditions().beam()))) {
      return false;
    }
    Instant end = start.plus(Timings.exposure(exposure, abilities));
    return !end.isAfter(readAt.plus(abilities.meter().readingEvery()));
  }
}
