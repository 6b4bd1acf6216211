/**
 * Wakes the engine when a shift opens or closes. Quartz types stay in this package; it imports
 * {@code run}, {@code plan}, {@code shift} and {@code timing}.
 */
package beamwarden.clockwork;
