/**
 * What one instrument can do and guarantees, and how its lab uses it: shifts, wind-down, retries.
 *
 * <p>May import {@code instrument} (abilities) and {@code shift}.
 */
package beamwarden.profile;
