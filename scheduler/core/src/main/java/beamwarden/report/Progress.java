package beamwarden.report;

import beamwarden.dose.Exposures;
import beamwarden.ledger.Books;
import beamwarden.ledger.JobRecord;
import beamwarden.queue.Acquisition;
import beamwarden.queue.Job;
import beamwarden.queue.JobState;
import beamwarden.run.Exposing;
import java.time.Instant;
import java.util.List;
import java.util.Optional;

/** Works out where jobs stand. */
public final class Progress {
  private final Books books;
  private final Optional<Exposing> exposing;
  private final Instant now;
  private final boolean shiftOpen;

  /**
   * Progress at a moment.
   *
   * @param books the books at that moment
   * @param exposing what is being exposed, if anything is
   * @param now the moment
   * @param shiftOpen whether a shift is open
   */
  public Progress(Books books, Optional<Exposing> exposing, Instant now, boolean shiftOpen) {
    this.books = books;
    this.exposing = exposing;
    this.now = now;
    this.shiftOpen = shiftOpen;
  }

  /** All jobs, in the order in which they were handed in. */
  public List<JobProgress> jobs() {
    return books.jobs().stream().map(this::of).toList();
  }

  /** One job. */
  public JobProgress of(JobRecord record) {
    Optional<RunningExposure> running =
        exposing
            .map(RunningExposure::of)
            .filter(exposure -> exposure.job().equals(record.job().id()));
    return JobProgress.of(record, state(record), doneFraction(record, running), running);
  }

  /** Ready is not written in the books: it follows from the moment. */
  private JobState state(JobRecord record) {
    boolean waiting = record.state() == JobState.WAITING;
    return waiting && shiftOpen && timely(record.job()) && unblocked(record)
        ? JobState.READY
        : record.state();
  }

  private boolean timely(Job job) {
    return job.earliest().filter(now::isBefore).isEmpty();
  }

  private boolean unblocked(JobRecord record) {
    return record.letGoOn()
        || record.job().after().stream()
            .allMatch(id -> books.job(id).filter(one -> one.state().satisfies()).isPresent());
  }

  /** A job whose points had their coincidences early is done all the same. */
  private static double doneFraction(JobRecord record, Optional<RunningExposure> running) {
    if (record.state() == JobState.DONE) {
      return 1;
    }
    double perPass = unitsPerPass(record.job().acquisition());
    double units = running.map(RunningExposure::unitsDone).orElse(0L);
    for (long ofPass : record.effectiveDone().unitsByPass().values()) {
      units += ofPass;
    }
    return Math.min(1, units / (perPass * Exposures.passes(record.job())));
  }

  private static long unitsPerPass(Acquisition acquisition) {
    return acquisition instanceof Acquisition.Raster raster
        ? raster.rows()
        : ((Acquisition.Spot) acquisition).longest().toNanos();
  }
}
