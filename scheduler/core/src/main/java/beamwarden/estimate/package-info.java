/**
 * Time, counts, signal and resolution to expect of a job, and what earlier runs taught about them.
 *
 * <p>May import {@code dose}, {@code physics}, {@code profile}, {@code queue}, {@code instrument}
 * (abilities), {@code beam} and {@code quantity}.
 */
package beamwarden.estimate;
