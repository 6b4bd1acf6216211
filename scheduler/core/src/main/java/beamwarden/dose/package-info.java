/**
 * The exposures a job consists of, their footprints, and the highest local fluence they leave, with
 * upper values. Imports {@code physics}, {@code profile}, {@code queue}, {@code beam} and {@code
 * quantity}.
 */
package beamwarden.dose;
