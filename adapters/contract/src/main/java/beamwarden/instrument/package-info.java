/**
 * The interface an instrument adapter implements, with its abilities, grants, receipts and
 * readings. Imports {@code beam}, {@code quantity} and {@code timing}.
 */
package beamwarden.instrument;
