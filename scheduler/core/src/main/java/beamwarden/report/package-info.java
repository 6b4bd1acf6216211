/**
 * Reports on a night, a job and its dose, as records that render to text and CSV. Imports {@code
 * run}, {@code plan}, {@code estimate}, {@code ledger}, {@code dose}, {@code queue}, {@code shift}
 * and {@code quantity}.
 */
package beamwarden.report;
