/**
 * A seeded instrument without hardware, for rehearsals, tests and simulated nights, on any line of
 * time, in this process or in one of its own.
 *
 * <p>Three parts outlive one another as they do in a lab. The <em>hardware</em> ({@link
 * beamwarden.simulated.Hardware}) is the metal: it goes on when the adapter's process is gone. The
 * <em>notes</em> ({@link beamwarden.simulated.Notes}) are what the adapter keeps durably. The
 * <em>adapter</em> ({@link beamwarden.simulated.SimulatedInstrument}) speaks the grant protocol
 * over both and may be replaced by another one at any moment. Beside them the hardware writes the
 * <em>truth</em> ({@link beamwarden.simulated.DeliveredRecord}): what the beam really did, which
 * only tests read.
 *
 * <p>What is invented, the scene and its light, the wander of the current, the time until somebody
 * closes a door, is called so where it stands.
 *
 * <p>May import {@code instrument}, {@code beam}, {@code quantity} and {@code timing}.
 */
package beamwarden.simulated;
