/**
 * Time that is passed in: wall time, elapsed time and waiting, real, at pace or virtual.
 *
 * <p>Wall time ({@link java.time.InstantSource}) and elapsed time ({@link
 * beamwarden.timing.Ticker}) are apart on purpose: a wall clock may step, elapsed time never does.
 * Only {@link beamwarden.timing.PacedTime} reads the machine's clocks.
 *
 * <p>May import nothing but the JDK.
 */
package beamwarden.timing;
