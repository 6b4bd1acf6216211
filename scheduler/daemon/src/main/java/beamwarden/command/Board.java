package beamwarden.command;

import beamwarden.answer.EntryAnswer;
import beamwarden.answer.JobsAnswer;
import beamwarden.answer.NowAnswer;
import beamwarden.answer.ProgressAnswer;
import beamwarden.queue.JobState;
import java.time.Instant;
import java.time.ZoneId;
import java.time.format.DateTimeFormatter;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.Locale;
import java.util.Map;

/** What a watcher knows: where the jobs stand, and whether the night is stopped. */
final class Board {
  private static final DateTimeFormatter TIME = DateTimeFormatter.ofPattern("HH:mm", Locale.ROOT);

  private final Map<String, ProgressAnswer> jobs = new LinkedHashMap<>();
  private final String instrument;
  private final ZoneId zone;
  private Instant at;
  private boolean stopped;
  private long entry;

  /** What a daemon says just now. */
  Board(NowAnswer now, JobsAnswer known) {
    instrument = now.instrument();
    zone = ZoneId.of(now.timeZone());
    at = now.now();
    stopped = now.stopped().isPresent();
    entry = known.entry();
    known.jobs().forEach(this::take);
  }

  /** Takes in an entry; its job's state follows as progress. */
  void take(EntryAnswer told) {
    entry = told.number();
    at = told.at();
    stopped = told.kind().equals("stopped") || (stopped && !told.kind().equals("goes-on"));
  }

  /** Takes in where a job stands. */
  void take(ProgressAnswer job) {
    jobs.put(job.id(), job);
  }

  /** The number of the last entry that is known. */
  long entry() {
    return entry;
  }

  String instrument() {
    return instrument;
  }

  /** The time of the last entry, by the lab's clock. */
  String time() {
    return time(at);
  }

  String time(Instant moment) {
    return TIME.format(moment.atZone(zone));
  }

  Collection<ProgressAnswer> jobs() {
    return jobs.values();
  }

  /** Whether some job may still run without a person's help. */
  boolean somethingMayRun() {
    boolean exposing = jobs.values().stream().anyMatch(job -> job.running().isPresent());
    return exposing || (!stopped && jobs.values().stream().anyMatch(Board::mayRun));
  }

  private static boolean mayRun(ProgressAnswer job) {
    JobState state = state(job);
    return !state.ended() && state != JobState.HELD;
  }

  /** Whether every job is done, or as much of it as was possible. */
  boolean allDone() {
    return jobs.values().stream().allMatch(job -> state(job).satisfies());
  }

  /** How it stands, in one sentence. */
  String summary() {
    if (jobs.isEmpty()) {
      return "There are no jobs.";
    }
    if (allDone()) {
      return "Every job is done.";
    }
    long done = jobs.values().stream().filter(job -> state(job).satisfies()).count();
    String rest = done + " of " + jobs.size() + " jobs are done";
    return stopped
        ? rest + ", and the night is stopped; release --all lets it go on."
        : rest + ", and no other can run; report says why.";
  }

  private static JobState state(ProgressAnswer job) {
    return JobState.valueOf(job.state().toUpperCase(Locale.ROOT));
  }
}
