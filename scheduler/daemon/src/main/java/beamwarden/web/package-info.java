/**
 * The REST interface, the event stream and the page, with access rules and an orderly stop.
 * Undertow types stay in this package.
 */
package beamwarden.web;
