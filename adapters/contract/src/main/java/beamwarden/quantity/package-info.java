/**
 * Physical quantities, each a record with one unit, so that a number never travels without it.
 *
 * <p>{@link beamwarden.quantity.QuantityText} reads them as people write them. Times are {@link
 * java.time.Duration} and {@link java.time.Instant} throughout.
 *
 * <p>May import nothing but the JDK.
 */
package beamwarden.quantity;
