/**
 * Time, counts, signal and resolution to expect of a job, and what earlier runs taught about them.
 * Imports {@code physics}, {@code dose}, {@code profile}, {@code queue}, {@code beam} and {@code
 * quantity}.
 */
package beamwarden.estimate;
