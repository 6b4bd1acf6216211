/**
 * Reads queues and instrument profiles, in YAML or JSON, and names file, line and column of every
 * problem at once.
 *
 * <p>A text becomes a tree of {@linkplain beamwarden.document.Node nodes} that know their place;
 * readers, one for each kind of group, make records of it and gather {@linkplain
 * beamwarden.document.Problem problems} on the way. A queue is checked against a profile in the
 * same pass. {@link beamwarden.document.Limits} bounds what a text may cost. Entry points are
 * {@link beamwarden.document.QueueDocuments} and {@link beamwarden.document.ProfileDocuments}.
 *
 * <p>May import {@code profile}, {@code queue}, {@code shift}, {@code physics} (formulas of
 * materials), {@code instrument} (abilities), {@code beam} and {@code quantity}. The YAML parser
 * and commons-text are seen nowhere else.
 */
package beamwarden.document;
