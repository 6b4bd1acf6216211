package beamwarden.plan;

import beamwarden.ledger.JobRecord;
import java.time.Instant;
import java.util.Collection;
import java.util.List;

/** Orders the jobs of the coming shifts. */
public interface Planner {
  /**
   * The jobs that may still be exposed, in the order in which they should be.
   *
   * @param jobs all jobs that the books know
   * @param now from when on
   */
  List<JobRecord> order(Collection<JobRecord> jobs, Instant now);
}
