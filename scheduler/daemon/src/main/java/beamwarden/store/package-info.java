/**
 * The ledger's journal on a database. JDBC types stay in this package; it imports {@code document},
 * the core and the contract.
 */
package beamwarden.store;
