/**
 * The HTTP server on loopback: who may ask, how requests come in and replies go out, the event
 * stream's connections, start and orderly stop.
 *
 * <p>The resources are in {@code web.api}, the stream's logic in {@code web.stream}. Undertow types
 * stay in this package. Reading is free on loopback; every change needs the token; the headers Host
 * and Origin must name this very server, so that no page of another site can ask anything.
 *
 * <p>May import {@code web.api}, {@code web.stream}, {@code answer}, {@code run} and {@code
 * ledger}.
 */
package beamwarden.web;
