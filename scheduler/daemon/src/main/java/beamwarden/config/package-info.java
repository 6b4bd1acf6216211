/**
 * The settings of the daemon as records, validated once and printed with secrets masked.
 *
 * <p>May import {@code ledger}, {@code shift} and {@code quantity}.
 */
package beamwarden.config;
