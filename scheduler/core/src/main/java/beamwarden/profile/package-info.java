/**
 * What one instrument can do: abilities, timings, tolerances and guarantees. Imports {@code beam}
 * and {@code quantity}.
 */
package beamwarden.profile;
