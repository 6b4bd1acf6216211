package beamwarden.system;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.ledger.Books;
import beamwarden.ledger.JobRecord;
import beamwarden.queue.JobState;
import beamwarden.queue.Queue;
import beamwarden.simulated.Simulation;
import org.junit.jupiter.api.Test;

/**
 * Whole nights from seeds, in virtual time, with faults at random steps and the daemon killed at
 * random operations; the {@link Invariants} are held after every event.
 *
 * <p>{@code ops/torture --rounds N --seed S} runs more of them, or replays one.
 */
class SimulatedNightsTest {
  private static final int NIGHTS = Integer.getInteger("nights", 200);
  private static final long SEED = Long.getLong("seed", Torture.SEED);

  @Test
  void everyInvariantHoldsAfterEveryEventOfManyNights() {
    Torture.Outcome outcome = Torture.nights(NIGHTS, SEED);
    System.out.printf("from seed %d: %s%n", SEED, outcome);
    assertTrue(outcome.stretches() > 150 * NIGHTS, "a night must expose about 200 times");
    assertTrue(outcome.kills() > NIGHTS, "the daemon must be killed in most nights");
    assertTrue(outcome.faults() > NIGHTS, "something must go wrong in most nights");
    assertTrue(outcome.surges() < NIGHTS, "most samples must be held to their caps");
  }

  @Test
  void withoutFaultsAndWithWideCapsEveryJobIsDone() {
    for (long seed = 1; seed <= 20; seed++) {
      Queue queue = new RandomQueue(seed, false).draw(3, 8);
      NightHarness harness = new NightHarness(Simulation.inMemory(seed), operation -> false, seed);
      Books books = harness.run(queue);
      for (JobRecord job : books.jobs()) {
        assertEquals(JobState.DONE, job.state(), "seed " + seed + ": " + job);
      }
    }
  }
}
