/**
 * The settings of the daemon as records, validated once and printed with secrets masked. Imports
 * {@code shift}, {@code ledger} and {@code quantity}.
 */
package beamwarden.config;
