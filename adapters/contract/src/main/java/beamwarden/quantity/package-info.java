/**
 * Physical quantities, each a record with one unit, so that a number never travels without it.
 *
 * <p>Times are {@link java.time.Duration} and {@link java.time.Instant} throughout. Imports nothing
 * but the JDK.
 */
package beamwarden.quantity;
