/**
 * Beam settings, regions and acquisition modes: what a queue and an instrument both speak. Imports
 * {@code quantity}.
 */
package beamwarden.beam;
