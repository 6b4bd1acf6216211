/**
 * Reports on a night, a job and a sample's dose, and the view of what goes on just now, as records;
 * and the same as pages of plain text.
 *
 * <p>Everything here is a pure function of the recorded entries and of the state of the run. A
 * {@link beamwarden.report.Night} is named after the local date on which its shifts open; what
 * happens between two nights belongs to the one before. {@link beamwarden.report.Pages} renders.
 *
 * <p>May import {@code run}, {@code plan}, {@code estimate}, {@code ledger}, {@code dose}, {@code
 * profile}, {@code queue}, {@code shift}, {@code instrument} (receipts and readings as values),
 * {@code beam} and {@code quantity}.
 */
package beamwarden.report;
