/**
 * Samples with their caps, jobs, and the states of jobs.
 *
 * <p>May import {@code beam} and {@code quantity}.
 */
package beamwarden.queue;
