/**
 * The exposures a job consists of, their footprints, and the highest local fluence they leave, with
 * upper values; and the verdict of a sample's caps on what is asked.
 *
 * <p>Everything here is a pure function of what it is given. May import {@code physics}, {@code
 * queue}, {@code instrument} (abilities, and receipts as values), {@code beam} and {@code
 * quantity}.
 */
package beamwarden.dose;
