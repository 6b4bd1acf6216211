/**
 * Samples, jobs, recipes and job states, and their validation. Imports {@code profile}, {@code
 * beam} and {@code quantity}.
 */
package beamwarden.queue;
