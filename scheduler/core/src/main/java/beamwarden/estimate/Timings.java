package beamwarden.estimate;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Conditions;
import beamwarden.beam.Exposure;
import beamwarden.beam.Point;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.ModeAbility;
import java.time.Duration;
import java.util.Optional;

/** How long things take on an instrument, as its profile says. Pure. */
public final class Timings {
  private Timings() {}

  /** The time of one exposure: the start of its frame, then its scan. */
  public static Duration exposure(Exposure exposure, Abilities abilities) {
    return frameStart(exposure, abilities).plus(exposure.scan().duration());
  }

  /** The time before the beam comes on. */
  public static Duration frameStart(Exposure exposure, Abilities abilities) {
    ModeAbility mode = abilities.modes().get(exposure.conditions().mode());
    return mode == null ? Duration.ZERO : mode.frameStart();
  }

  /**
   * The time to go from one set of conditions to another: the stage, the column and the filter move
   * side by side, and the slowest decides. From unknown conditions everything is taken to change.
   */
  public static Duration preparation(
      Optional<Conditions> from,
      Optional<Point> stage,
      Conditions to,
      Point target,
      Abilities abilities) {
    Duration travel =
        stage.map(at -> abilities.stage().travel(at, target)).orElse(Duration.ZERO);
    Duration column =
        from.map(before -> abilities.column().settling(before.beam(), to.beam()))
            .orElse(abilities.column().settling(NOTHING_SET, to.beam()));
    boolean sameFilter = from.map(Conditions::filter).equals(Optional.of(to.filter()));
    Duration filter = sameFilter ? Duration.ZERO : abilities.filterChange();
    return longest(travel, longest(column, filter));
  }

  private static final BeamSettings NOTHING_SET =
      new BeamSettings(
          new beamwarden.quantity.Voltage(Double.MIN_VALUE),
          new beamwarden.quantity.Current(Double.MIN_VALUE));

  private static Duration longest(Duration one, Duration other) {
    return one.compareTo(other) >= 0 ? one : other;
  }
}
