package beamwarden.plan;

import beamwarden.ledger.JobRecord;
import beamwarden.queue.JobState;
import java.time.Instant;
import java.util.Collection;
import java.util.Comparator;
import java.util.List;

/**
 * The simplest order that keeps its promises: a job that is running goes on, then the one with the
 * highest priority comes first, then the one that was handed in first.
 *
 * <p>Which jobs must come before which others is the run's to check, job by job.
 */
public final class PriorityPlanner implements Planner {
  private static final Comparator<JobRecord> ORDER =
      Comparator.comparing((JobRecord record) -> record.state() != JobState.RUNNING)
          .thenComparing(record -> record.job().priority(), Comparator.reverseOrder())
          .thenComparing(JobRecord::place);

  @Override
  public List<JobRecord> order(Collection<JobRecord> jobs, Instant now) {
    return jobs.stream()
        .filter(record -> !record.state().ended() && record.state() != JobState.HELD)
        .sorted(ORDER)
        .toList();
  }
}
