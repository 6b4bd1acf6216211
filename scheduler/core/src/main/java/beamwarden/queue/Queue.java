package beamwarden.queue;

import java.util.List;

/**
 * The document a user writes: samples with their caps, and jobs.
 *
 * @param name the queue's name
 * @param samples the samples, each id once
 * @param jobs the jobs in the order in which they were written, each id once
 */
public record Queue(String name, List<Sample> samples, List<Job> jobs) {
  /** Copies the lists. */
  public Queue {
    samples = List.copyOf(samples);
    jobs = List.copyOf(jobs);
  }
}
