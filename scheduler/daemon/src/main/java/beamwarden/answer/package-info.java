/**
 * What programs are answered: one JSON form of reports, states, checks and problems, shared by the
 * REST interface and {@code --json}.
 *
 * <p>Each record names its keys; they are stable, and a number carries its unit in its key ({@code
 * duration_s}) or in a {@code unit} beside it. Moments are in UTC (RFC 3339). {@link
 * beamwarden.answer.Json} writes and reads them; Jackson types stay in this package.
 *
 * <p>May import {@code document} (problems), {@code report}, {@code plan}, {@code run}, {@code
 * ledger}, {@code dose}, {@code queue}, {@code shift}, {@code instrument} (files and readings),
 * {@code beam} and {@code quantity}.
 */
package beamwarden.answer;
