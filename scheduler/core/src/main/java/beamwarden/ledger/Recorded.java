package beamwarden.ledger;

import java.time.Instant;

/**
 * An entry as it stands in the books.
 *
 * @param number its place among all entries, from 1 on
 * @param at when it was stored, on the store's own line of time
 * @param fence the fencing number under which it was stored
 * @param entry the entry
 * @param hash its SHA-256 over its bytes and the hash before it in its chain, in hexadecimal
 */
public record Recorded(long number, Instant at, long fence, Entry entry, String hash) {}
