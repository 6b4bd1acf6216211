/**
 * The one place where concrete classes meet, in the order they start and stop. Imports everything
 * but {@code command}.
 */
package beamwarden.wiring;
