package beamwarden.system;

import beamwarden.document.ProfileDocuments;
import beamwarden.ledger.Books;
import beamwarden.ledger.JobRecord;
import beamwarden.ledger.Recorded;
import beamwarden.profile.Profile;
import beamwarden.queue.JobState;
import beamwarden.shift.ShiftCalendar;
import beamwarden.store.SqliteJournal;
import java.io.IOException;
import java.io.InputStream;
import java.net.http.HttpTimeoutException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.time.Duration;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.SplittableRandom;
import tools.jackson.databind.JsonNode;

/**
 * Real processes, killed without warning: serve, submit, kill the daemon or the instrument at
 * random moments, start again, until the night ends; then the books are held against the
 * instrument's own record.
 */
final class ProcessTorture {
  private static final String ROOM = "torture-room";
  private static final int PACE = 150;
  private static final int MOST_KILLS = 8;
  private static final long LONGEST_ROUND_NANOS = Duration.ofMinutes(6).toNanos();

  /** How far the processes' readings of the wall clock may be apart, on the paced line. */
  private static final Duration CLOCK_SLACK = Duration.ofMillis(50L * PACE);

  private final SplittableRandom random;
  private final boolean tight;
  private final Path folder;
  private final Daemon daemon;
  private int kills;

  private ProcessTorture(long seed, Path folder) {
    this.random = new SplittableRandom(seed);
    this.tight = seed % 2 == 0;
    this.folder = folder;
    this.daemon = new Daemon(folder.resolve("torture-room.yaml"), folder.resolve("store"));
  }

  /**
   * What a round showed.
   *
   * @param seed its seed
   * @param kills how many processes were killed
   * @param stretches stretches of beam
   * @param presumed grants whose outcome stayed unknown
   * @param jobs jobs by the state in which they ended
   */
  record Outcome(long seed, int kills, int stretches, int presumed, Map<JobState, Integer> jobs) {}

  /** One round in an empty folder. */
  static Outcome round(long seed, Path folder) throws IOException, InterruptedException {
    ProcessTorture torture = new ProcessTorture(seed, folder);
    try {
      return torture.run(seed);
    } catch (AssertionError | RuntimeException | IOException broken) {
      throw new AssertionError(
          "process round with seed "
              + seed
              + " breaks: "
              + broken.getMessage()
              + "\nits files are in "
              + folder
              + "\nreplay it with: ops/torture --processes 1 --seed "
              + seed,
          broken);
    } finally {
      torture.end();
    }
  }

  private Outcome run(long seed) throws IOException, InterruptedException {
    Files.createDirectories(folder.resolve("store"));
    copy("torture-room.yaml");
    String queue = copy(tight ? "torture-tight.yaml" : "torture-slack.yaml");
    daemon.start(
        "--pace", Integer.toString(PACE), "--from", "2031-03-12T09:00", "--seed", "" + seed);
    require(daemon.post("/api/v1/queues", "application/yaml", queue) == 201, "submit is refused");
    long latest = System.nanoTime() + LONGEST_ROUND_NANOS;
    while (!ended()) {
      require(System.nanoTime() < latest, "the night does not come to its end");
      Thread.sleep(random.nextLong(100, 1500));
      if (kills < MOST_KILLS) {
        killSomething();
      }
    }
    daemon.stop();
    return verify(seed);
  }

  private String copy(String name) throws IOException {
    try (InputStream resource = ProcessTorture.class.getResourceAsStream(name)) {
      Files.copy(resource, folder.resolve(name), StandardCopyOption.REPLACE_EXISTING);
    }
    return Files.readString(folder.resolve(name));
  }

  private void killSomething() throws IOException, InterruptedException {
    kills++;
    boolean both = random.nextInt(4) == 0;
    if (both || random.nextBoolean()) {
      daemon.kill();
    }
    if (both || daemon.isAlive()) {
      daemon.instrument(ROOM).flatMap(ProcessHandle::of).ifPresent(ProcessHandle::destroyForcibly);
    }
    if (!daemon.isAlive()) {
      Thread.sleep(random.nextLong(0, 800));
      daemon.start();
    }
  }

  private boolean ended() throws IOException, InterruptedException {
    try {
      JsonNode jobs = daemon.get("/api/v1/jobs").get("jobs");
      for (JsonNode job : jobs) {
        String state = job.get("state").asString();
        boolean over = state.matches("done|shortened|refused|failed|withdrawn|held");
        if (!over) {
          return false;
        }
      }
      return true;
    } catch (HttpTimeoutException slow) {
      return false;
    }
  }

  private Outcome verify(long seed) throws IOException {
    Profile profile = ProfileDocuments.read(folder.resolve("torture-room.yaml")).value().get();
    Path store = folder.resolve("store");
    List<Beam> beams =
        DeliveredFile.read(store.resolve("simulated").resolve(ROOM).resolve("delivered.jsonl"));
    try (SqliteJournal journal = SqliteJournal.readOnly(store)) {
      require(journal.firstBreak().isEmpty(), "the chain is broken: " + journal.firstBreak());
      List<Recorded> recorded = journal.read();
      Books books = Books.of(recorded);
      ShiftCalendar calendar =
          new ShiftCalendar(profile.zone(), profile.shifts(), profile.windDown());
      Invariants invariants = new Invariants(calendar, seed, CLOCK_SLACK);
      invariants.check(recorded, books, beams);
      invariants.checkAtTheEnd(books);
      return outcome(seed, books, beams.size());
    }
  }

  private Outcome outcome(long seed, Books books, int stretches) {
    Map<JobState, Integer> jobs = new EnumMap<>(JobState.class);
    for (JobRecord job : books.jobs()) {
      jobs.merge(job.state(), 1, Integer::sum);
      require(
          tight || job.state() == JobState.DONE,
          "with wide caps every job ends done, but " + job.job().id() + ": " + job.because());
      require(
          !tight
              || List.of(JobState.DONE, JobState.SHORTENED, JobState.REFUSED).contains(job.state()),
          "with tight caps a job is done, shortened or refused, but " + job);
    }
    return new Outcome(seed, kills, stretches, books.unresolved().size(), jobs);
  }

  private void end() throws IOException, InterruptedException {
    if (daemon.isAlive()) {
      daemon.kill();
    }
    daemon.instrument(ROOM).flatMap(ProcessHandle::of).ifPresent(ProcessHandle::destroyForcibly);
  }

  private static void require(boolean holds, String broken) {
    if (!holds) {
      throw new AssertionError(broken);
    }
  }
}
