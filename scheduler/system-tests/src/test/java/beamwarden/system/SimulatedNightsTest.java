package beamwarden.system;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.ledger.Books;
import beamwarden.ledger.JobRecord;
import beamwarden.queue.JobState;
import beamwarden.queue.Queue;
import beamwarden.simulated.RandomFaults;
import beamwarden.simulated.Simulation;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;

/**
 * Whole nights from seeds, in virtual time, with faults at random steps and the daemon killed at
 * random operations; the {@link Invariants} are held after every event.
 *
 * <p>{@code ops/torture --rounds N --seed S} runs more of them, or replays one.
 */
class SimulatedNightsTest {
  private static final int NIGHTS = Integer.getInteger("nights", 200);
  private static final long SEED = Long.getLong("seed", 20310312L);
  private static final double FAULTS_PER_STEP = 0.004;
  private static final double KILLS_PER_OPERATION = 0.002;

  @Test
  void everyInvariantHoldsAfterEveryEventOfManyNights() {
    int exposures = 0;
    int kills = 0;
    for (int i = 0; i < NIGHTS; i++) {
      long seed = SEED + i;
      NightHarness harness = night(seed);
      kills += harness.kills();
      exposures += harness.stretches();
    }
    System.out.printf(
        "%d nights from seed %d: %d stretches of beam, daemon killed %d times%n",
        NIGHTS, SEED, exposures, kills);
    assertTrue(exposures > NIGHTS, "the nights must expose something");
  }

  private static NightHarness night(long seed) {
    boolean tight = seed % 2 == 0;
    SplittableRandom chance = new SplittableRandom(seed);
    Simulation simulation =
        Simulation.inMemory(seed).with(new RandomFaults(seed, FAULTS_PER_STEP));
    NightHarness harness =
        new NightHarness(
            simulation, operation -> chance.nextDouble() < KILLS_PER_OPERATION, seed);
    try {
      harness.run(new RandomQueue(seed, tight).draw(3, 8));
    } catch (AssertionError | RuntimeException broken) {
      throw new AssertionError(
          "seed "
              + seed
              + " breaks: "
              + broken.getMessage()
              + "\nreplay it with: ops/torture --rounds 1 --seed "
              + seed,
          broken);
    }
    return harness;
  }

  @Test
  void withoutFaultsAndWithWideCapsEveryJobIsDone() {
    for (long seed = 1; seed <= 20; seed++) {
      Queue queue = new RandomQueue(seed, false).draw(3, 8);
      NightHarness harness =
          new NightHarness(Simulation.inMemory(seed), operation -> false, seed);
      Books books = harness.run(queue);
      for (JobRecord job : books.jobs()) {
        assertEquals(JobState.DONE, job.state(), "seed " + seed + ": " + job);
      }
    }
  }
}
