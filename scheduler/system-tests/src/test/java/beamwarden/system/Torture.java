package beamwarden.system;

import beamwarden.ledger.Books;
import beamwarden.ledger.JobRecord;
import beamwarden.queue.JobState;
import beamwarden.simulated.RandomFaults;
import beamwarden.simulated.Simulation;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Comparator;
import java.util.EnumMap;
import java.util.HashMap;
import java.util.Map;
import java.util.SplittableRandom;
import java.util.stream.Stream;

/** Simulated nights by seed: the same for the tests and for {@code ops/torture}. */
final class Torture {
  private static final double FAULTS_PER_STEP = 0.004;
  private static final double KILLS_PER_OPERATION = 0.002;
  private static final int SAMPLES = 3;
  private static final int JOBS = 30;
  private static final long LINE_EVERY = 50;

  /** The first seed when none is given. */
  static final long SEED = 20310312;

  private Torture() {}

  /**
   * What came of some nights.
   *
   * @param nights how many
   * @param stretches stretches of beam in all
   * @param kills how often the daemon was killed
   * @param faults how many faults were noted
   * @param surges on how many samples the instrument left its guarantees, so that caps may be
   *     passed
   * @param jobs jobs by the state in which they ended
   */
  record Outcome(
      int nights, int stretches, int kills, int faults, int surges, Map<JobState, Integer> jobs) {
    static Outcome none() {
      return new Outcome(0, 0, 0, 0, 0, new EnumMap<>(JobState.class));
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
          surges + night.surges(),
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

  /**
   * {@code --rounds N} runs nights in virtual time, {@code --processes N} rounds of real processes;
   * {@code --seed S} is the first seed.
   */
  public static void main(String[] arguments) throws IOException, InterruptedException {
    Map<String, Long> options = new HashMap<>();
    for (int i = 0; i + 1 < arguments.length; i += 2) {
      options.put(arguments[i], Long.parseLong(arguments[i + 1]));
    }
    long seed = options.getOrDefault("--seed", SEED);
    if (options.containsKey("--processes")) {
      processes(options.get("--processes"), seed);
    } else {
      rounds(options.getOrDefault("--rounds", 200L), seed);
    }
  }

  private static void rounds(long rounds, long seed) {
    long began = System.nanoTime();
    Outcome outcome = Outcome.none();
    for (long i = 0; i < rounds; i++) {
      outcome = night(seed + i, outcome);
      if ((i + 1) % LINE_EVERY == 0 || i + 1 == rounds) {
        System.out.println(outcome);
      }
    }
    System.out.printf(
        "%d nights from seed %d hold every invariant, in %.0f s%n", rounds, seed, since(began));
  }

  private static void processes(long rounds, long seed) throws IOException, InterruptedException {
    long began = System.nanoTime();
    for (long i = 0; i < rounds; i++) {
      Path folder = Files.createTempDirectory("beamwarden-torture-");
      System.out.println(ProcessTorture.round(seed + i, folder));
      delete(folder);
    }
    System.out.printf(
        "%d rounds from seed %d hold every invariant, in %.0f s%n", rounds, seed, since(began));
  }

  /** Deletes a folder with all that is in it. */
  static void delete(Path folder) throws IOException {
    try (Stream<Path> paths = Files.walk(folder)) {
      for (Path path : paths.sorted(Comparator.reverseOrder()).toList()) {
        Files.delete(path);
      }
    }
  }

  private static double since(long began) {
    return (System.nanoTime() - began) / 1e9;
  }
}
