/**
 * Electrons in matter, the probe and the raster, as pure functions that name their sources.
 *
 * <p>Sigma is a standard deviation, width a full width at half maximum. Fluences are e/nm². May
 * import {@code quantity}.
 */
package beamwarden.physics;
