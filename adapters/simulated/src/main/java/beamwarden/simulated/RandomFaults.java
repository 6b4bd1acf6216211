package beamwarden.simulated;

import java.util.Optional;
import java.util.SplittableRandom;

/** Faults of every kind at random steps, for simulated nights. Repeats itself from its seed. */
public final class RandomFaults implements FaultPlan {
  private static final Mishap[] KINDS = Mishap.values();

  private final SplittableRandom random;
  private final double perStep;

  /**
   * Random faults.
   *
   * @param seed the seed
   * @param perStep how likely something goes wrong at any one step, from 0 to 1
   */
  public RandomFaults(long seed, double perStep) {
    this.random = Seeds.random(seed, "faults");
    this.perStep = perStep;
  }

  @Override
  public Optional<Strike> at(Step step, long exposed) {
    if (random.nextDouble() >= perStep) {
      return Optional.empty();
    }
    Mishap mishap = KINDS[random.nextInt(KINDS.length)];
    return Optional.of(new Strike(mishap, random.nextDouble()));
  }
}
