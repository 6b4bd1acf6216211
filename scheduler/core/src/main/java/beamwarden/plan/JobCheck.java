package beamwarden.plan;

import beamwarden.dose.JobDose;
import beamwarden.queue.Job;
import java.util.Locale;
import java.util.Optional;

/**
 * What a check says of one job.
 *
 * @param job the job
 * @param verdict what will become of it
 * @param why why it does not fit whole; empty when it does
 * @param dose what all of it would give its sample, it alone; what remains of it when it is trimmed
 * @param visit when it is exposed; empty when it is not
 */
public record JobCheck(
    Job job, Verdict verdict, String why, JobDose dose, Optional<Walk.Visit> visit) {
  /** What will become of a job. */
  public enum Verdict {
    /** All of it is done. */
    FITS,
    /** A part of it is done. */
    TRIMMED,
    /** A cap or a rule forbids it. */
    REFUSED,
    /** It waits for a person, another job, or a shift that is not in sight. */
    HELD;

    /** The verdict's name in documents. */
    public String text() {
      return name().toLowerCase(Locale.ROOT);
    }
  }
}
