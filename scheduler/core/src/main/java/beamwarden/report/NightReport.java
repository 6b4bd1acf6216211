package beamwarden.report;

import beamwarden.instrument.CurrentReading;
import beamwarden.instrument.DataFile;
import beamwarden.queue.JobState;
import java.time.Instant;
import java.time.ZoneId;
import java.util.List;

/**
 * What was done in a night, when, at what dose, and what was not done and why.
 *
 * <p>Jobs and samples stand as they did when the night was over: doses are cumulative over all
 * nights.
 *
 * @param instrument the instrument's name
 * @param night the night
 * @param zone the lab's time zone, for people
 * @param jobs the jobs that had not ended before the night began
 * @param samples all samples
 * @param events faults, stops and approvals, in order
 * @param presumed grants stored in the night whose outcome is not known; they count in full
 * @param readings current readings, in order
 * @param files data files, in the order of their receipts
 */
public record NightReport(
    String instrument,
    Night night,
    ZoneId zone,
    List<JobReport> jobs,
    List<SampleReport> samples,
    List<NightEvent> events,
    List<GrantLine> presumed,
    List<Reading> readings,
    List<File> files) {
  /** Copies the lists. */
  public NightReport {
    jobs = List.copyOf(jobs);
    samples = List.copyOf(samples);
    events = List.copyOf(events);
    presumed = List.copyOf(presumed);
    readings = List.copyOf(readings);
    files = List.copyOf(files);
  }

  /**
   * A current reading.
   *
   * @param at when it was stored
   * @param reading what the meter showed
   */
  public record Reading(Instant at, CurrentReading reading) {}

  /**
   * A data file and what it belongs to.
   *
   * @param job the id of its job
   * @param grant the number of the grant whose receipt named it
   * @param file the file
   */
  public record File(String job, long grant, DataFile file) {}

  /** The jobs that are not wholly done. */
  public List<JobReport> undone() {
    return jobs.stream().filter(job -> job.progress().state() != JobState.DONE).toList();
  }
}
