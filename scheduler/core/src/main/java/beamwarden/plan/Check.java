package beamwarden.plan;

import beamwarden.dose.Done;
import beamwarden.dose.JobDose;
import beamwarden.dose.SampleDose;
import beamwarden.instrument.Abilities;
import beamwarden.ledger.Books;
import beamwarden.ledger.JobRecord;
import beamwarden.plan.JobCheck.Verdict;
import beamwarden.queue.Job;
import beamwarden.queue.Queue;
import beamwarden.queue.Sample;
import beamwarden.shift.ShiftCalendar;
import java.time.Instant;
import java.util.List;
import java.util.Optional;

/** Says beforehand of each job of a queue how long it takes, what it gives, and whether it fits. */
public final class Check {
  private Check() {}

  /**
   * Checks a queue, as if it were handed in now.
   *
   * @param books what is known before; {@link Books#EMPTY} for a new store
   * @param from when the first shift may begin
   * @throws IllegalArgumentException when the books already know one of its jobs
   */
  public static List<JobCheck> of(
      Queue queue,
      Abilities abilities,
      ShiftCalendar calendar,
      Planner planner,
      Books books,
      Instant from) {
    for (Job job : queue.jobs()) {
      if (books.job(job.id()).isPresent()) {
        throw new IllegalArgumentException(
            "the store already has a job " + job.id() + "; give this one another id");
      }
    }
    Books handedIn = Walk.with(books, queue, from);
    Walk.Result walked = Walk.of(abilities, calendar, planner, handedIn, from);
    return queue.jobs().stream().map(job -> of(job, walked, abilities)).toList();
  }

  private static JobCheck of(Job job, Walk.Result walked, Abilities abilities) {
    JobRecord record = walked.books().job(job.id()).orElseThrow();
    Sample sample = walked.books().sample(job.sample()).orElseThrow().sample();
    JobDose dose =
        JobDose.of(
            job,
            sample,
            abilities,
            SampleDose.nothing(sample.placement()),
            Done.NOTHING,
            record.trim());
    Verdict verdict = verdict(record);
    return new JobCheck(
        job,
        verdict,
        verdict == Verdict.FITS ? "" : why(record),
        dose,
        Optional.ofNullable(walked.visits().get(job.id())));
  }

  private static Verdict verdict(JobRecord record) {
    return switch (record.state()) {
      case DONE -> Verdict.FITS;
      case SHORTENED -> Verdict.TRIMMED;
      case REFUSED, FAILED, WITHDRAWN -> Verdict.REFUSED;
      case WAITING, READY, RUNNING, HELD -> Verdict.HELD;
    };
  }

  private static String why(JobRecord record) {
    if (record.trim().isPresent()) {
      return record.trimmedBecause();
    }
    boolean waits = !record.state().ended() && record.heldFor().isEmpty();
    return waits
        ? "no shift among the next " + Walk.SHIFTS_MOST + " has room for it, or for a job before it"
        : record.because();
  }
}
