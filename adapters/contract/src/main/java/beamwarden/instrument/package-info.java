/**
 * The contract between the daemon and whatever drives an instrument.
 *
 * <p>{@link beamwarden.instrument.Instrument} lists the verbs and every promise, numbered. The
 * order of a night: connect, seal, prepare, measure, then for each grant begin, begun, ended,
 * acknowledge; last wind down. After a lost connection: connect, seal, and so on from there.
 *
 * <p>May import {@code beam}, {@code quantity}, {@code timing}.
 */
package beamwarden.instrument;
