package beamwarden.store;

import beamwarden.ledger.ChainHash;

/**
 * An entry as it lies in the table.
 *
 * @param number its number
 * @param at its moment, RFC 3339 in UTC
 * @param fence the fencing number under which it was stored
 * @param chain its chain
 * @param kind the name of its kind
 * @param format the number of the body's format
 * @param body its JSON
 * @param hash its hash
 */
record Row(
    long number,
    String at,
    long fence,
    String chain,
    String kind,
    int format,
    String body,
    String hash) {
  /** What its hash must be, after a given one. */
  String hashAfter(String previous) {
    return ChainHash.entry(previous, number, at, fence, chain, kind, format, body);
  }

  /** The same row with the hash that it must have after a given one. */
  Row chainedAfter(String previous) {
    return new Row(number, at, fence, chain, kind, format, body, hashAfter(previous));
  }
}
