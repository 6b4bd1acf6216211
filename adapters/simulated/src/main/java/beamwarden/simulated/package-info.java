/**
 * A seeded, clock-driven instrument without hardware, for tests, the tour and simulated nights.
 * Imports the contract.
 */
package beamwarden.simulated;
