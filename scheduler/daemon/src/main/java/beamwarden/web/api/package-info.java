/**
 * The resources of the REST interface, one class each, as functions of a request: which paths there
 * are, what each reads and answers, and how a refusal looks (RFC 9457).
 *
 * <p>Knows nothing of HTTP servers: {@code web} hands requests in and writes replies out. Every
 * change is a wish to the {@link beamwarden.run.Desk} and is answered when it is on disk.
 *
 * <p>May import {@code answer}, {@code document}, {@code report}, {@code run}, {@code plan}, {@code
 * ledger}, {@code profile}, {@code queue}, {@code shift} and {@code instrument} (how soon to stop).
 */
package beamwarden.web.api;
