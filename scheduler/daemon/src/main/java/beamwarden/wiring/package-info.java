/**
 * The one place where concrete classes meet, in the order they start and stop.
 *
 * <p>May import everything but {@code simulated} and {@code kit}: adapters are found at run time.
 */
package beamwarden.wiring;
