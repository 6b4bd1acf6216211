/**
 * Entries, grant states and caps, the verdict on a new exposure, and the journal that makes them
 * durable. Imports {@code instrument} for its grants and receipts, {@code dose}, {@code queue},
 * {@code quantity} and {@code timing}.
 */
package beamwarden.ledger;
