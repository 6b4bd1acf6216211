/**
 * The dose books: entries that are only ever added, what they say taken together, and the journal
 * that makes them durable.
 *
 * <p>A grant's way, in the order in which things become durable. After a crash between any two
 * steps, what stands beside the later one is true when the daemon starts again:
 *
 * <ol>
 *   <li>The fence is raised in the store. <i>Crash before:</i> nothing has happened. Commits of an
 *       older daemon are refused from here on.
 *   <li>The instrument is sealed under that fence; it durably raises its own. <i>Crash before:</i>
 *       the instrument still obeys the older daemon's grants, which are all in the books; nothing
 *       new was sent. The next start raises the fence once more and seals.
 *   <li>The fates the seal reported are committed: receipts booked, never begun voided, unknown
 *       presumed. <i>Crash before:</i> the grants are still open and count in full; the adapter
 *       keeps its receipts; the next seal asks again.
 *   <li>{@link beamwarden.ledger.Entry.GrantOpened} is committed; from here on it counts in full.
 *       <i>Crash before:</i> no such grant exists. <i>Outcome of the commit unknown:</i> it is
 *       never sent; after the restart it is either not there, or open and sealed as never begun.
 *   <li>The grant is sent. <i>Crash before:</i> it is open in the books and was never sent: sealed
 *       as never begun, voided.
 *   <li>The adapter durably notes that it begins, then the beam comes on. <i>Crash of the daemon
 *       before:</i> the seal makes it impossible to start, or reports what was done. <i>Crash of
 *       the adapter before:</i> it never begins. <i>After the note:</i> the adapter reports a
 *       receipt, or unknown, which is presumed in full.
 *   <li>Data is forced to disk, the adapter durably keeps the receipt, then sends it. <i>Crash
 *       before it is kept:</i> unknown, presumed in full. <i>After:</i> the seal reports it.
 *   <li>While it exposes, the next {@code GrantOpened} is committed. <i>Crash after:</i> both are
 *       open, both are asked about; the one that was not sent is voided.
 *   <li>The next grant may be sent as soon as the receipt of the one before has come in, on disk or
 *       not: it is on disk itself, and the one before counts in full until its receipt is.
 *   <li>{@link beamwarden.ledger.Entry.GrantBooked} is committed, with the progress it means and
 *       the event in one. <i>Crash before:</i> open, counted in full, asked about; the adapter
 *       still keeps the receipt.
 *   <li>The receipt is acknowledged; the adapter forgets it. <i>Crash before:</i> it is kept a
 *       while longer, and nobody asks for it.
 * </ol>
 *
 * <p>So a crash can only ever leave too much in the books, never too little; and what is too much
 * is put right by a later seal where the adapter can prove it.
 *
 * <p>May import {@code dose}, {@code queue}, {@code instrument} (grants and receipts as values),
 * {@code beam}, {@code quantity}, {@code timing}.
 */
package beamwarden.ledger;
