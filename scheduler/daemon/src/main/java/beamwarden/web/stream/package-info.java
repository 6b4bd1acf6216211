/**
 * The event stream: every recorded entry, in order, without a gap or a double, and where jobs stand
 * in between.
 *
 * <p>Each follower has a cursor of its own, the number of the last entry it was handed. One thread
 * feeds all of them from the books, so replaying and following are the same thing. Progress has no
 * number: it is what is true now, and a follower that comes back is told it afresh. Knows nothing
 * of HTTP.
 *
 * <p>May import {@code answer}, {@code run}, {@code ledger} and {@code web.api} (the view of jobs).
 */
package beamwarden.web.stream;
