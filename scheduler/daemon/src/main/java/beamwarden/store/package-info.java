/**
 * The ledger's journal in an SQLite file.
 *
 * <p>{@link beamwarden.store.SqliteJournal} is all that others see; JDBC and JSON types stay in
 * this package. What the file holds stands in {@code schema-0001.sql}, how its rows are chained in
 * {@link beamwarden.ledger.ChainHash}, and what is promised of a body in {@code EntryJson}.
 *
 * <p>May import {@code bridge} (the JSON form of the contract), {@code ledger} and {@code queue}.
 */
package beamwarden.store;
