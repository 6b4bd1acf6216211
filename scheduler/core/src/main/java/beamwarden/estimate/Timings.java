package beamwarden.estimate;

import beamwarden.beam.Conditions;
import beamwarden.beam.Exposure;
import beamwarden.beam.Mode;
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
    return frameStart(exposure.conditions().mode(), abilities).plus(exposure.scan().duration());
  }

  /** The time between a grant and its first electron. */
  public static Duration frameStart(Mode mode, Abilities abilities) {
    ModeAbility ability = abilities.modes().get(mode);
    return ability == null ? Duration.ZERO : ability.frameStart();
  }

  /** The time to go from one set of conditions to another; an unknown stage counts as there. */
  public static Duration preparation(
      Optional<Conditions> from,
      Optional<Point> stage,
      Conditions to,
      Point target,
      Abilities abilities) {
    return abilities.preparation(from, stage.orElse(target), to, target);
  }
}
