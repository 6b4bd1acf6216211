/**
 * Electrons in matter, the probe, absorbed dose and counting statistics, as pure functions that
 * name their sources. Imports {@code beam} and {@code quantity}.
 */
package beamwarden.physics;
