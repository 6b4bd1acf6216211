package beamwarden.system;

import beamwarden.ledger.Books;
import beamwarden.ledger.JobRecord;
import beamwarden.queue.JobState;
import beamwarden.simulated.RandomFaults;
import beamwarden.simulated.Simulation;
import java.util.EnumMap;
import java.util.Map;
import java.util.SplittableRandom;

/** Simulated nights by seed: the same for the tests and for {@code ops/torture}. */
final class Torture {
  private static final double FAULTS_PER_STEP = 0.004;
  private static final double KILLS_PER_OPERATION = 0.002;
  private static final int SAMPLES = 3;
  private static final int JOBS = 10;

  private Torture() {}

  /**
   * What came of some nights.
   *
   * @param nights how many
   * @param stretches stretches of beam in all
   * @param kills how often the daemon was killed
   * @param faults how many faults were noted
   * @param jobs jobs by the state in which they ended
   */
  record Outcome(int nights, int stretches, int kills, int faults, Map<JobState, Integer> jobs) {
    static Outcome none() {
      return new Outcome(0, 0, 0, 0, new EnumMap<>(JobState.class));
    }

    Outcome plus(NightHarness night, Books books) {
      Map<JobState, Integer> sum = new EnumMap<>(JobState.class);
      sum.putAll(jobs);
      for (JobRecord job : books.jobs()) {
        sum.merge(job.state(), 1, Integer::sum);
      }
      return new Outcome(
          nights + 1,
          stretches + night.stretches(),
          kills + night.kills(),
          faults + night.faults(),
          sum);
    }
  }

  /** Runs nights with seeds from {@code seed} on; throws with the seed of the first that fails. */
  static Outcome nights(int nights, long seed) {
    Outcome outcome = Outcome.none();
    for (int i = 0; i < nights; i++) {
      outcome = night(seed + i, outcome);
    }
    return outcome;
  }

  private static Outcome night(long seed, Outcome before) {
    boolean tight = seed % 2 == 0;
    SplittableRandom chance = new SplittableRandom(seed);
    Simulation simulation = Simulation.inMemory(seed).with(new RandomFaults(seed, FAULTS_PER_STEP));
    NightHarness harness =
        new NightHarness(simulation, operation -> chance.nextDouble() < KILLS_PER_OPERATION, seed);
    try {
      Books books = harness.run(new RandomQueue(seed, tight).draw(SAMPLES, JOBS));
      return before.plus(harness, books);
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
  }

  /** {@code ROUNDS SEED}: runs that many nights, with a line for each ten. */
  public static void main(String[] arguments) {
    int rounds = Integer.parseInt(arguments[0]);
    long seed = Long.parseLong(arguments[1]);
    long began = System.nanoTime();
    Outcome outcome = Outcome.none();
    for (int i = 0; i < rounds; i++) {
      outcome = night(seed + i, outcome);
      if ((i + 1) % 10 == 0 || i + 1 == rounds) {
        System.out.println(outcome);
      }
    }
    System.out.printf(
        "%d nights from seed %d hold every invariant, in %.0f s%n",
        rounds, seed, (System.nanoTime() - began) / 1e9);
  }
}
