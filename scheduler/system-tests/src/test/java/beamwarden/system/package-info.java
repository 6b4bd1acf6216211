/**
 * Whole nights on the simulated instrument, restarts after a kill, and the rules of the
 * architecture. May import everything.
 */
package beamwarden.system;
