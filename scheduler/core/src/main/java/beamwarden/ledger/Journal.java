package beamwarden.ledger;

import java.time.Instant;
import java.util.List;

/**
 * Where the books are kept, durably. One writer.
 *
 * <p>{@link #commit} must be atomic: after it returns, all its entries are on disk and will be read
 * back after any crash; when it throws, either none of them is, or it is not known, and the caller
 * must treat what it wanted to store as never stored and never send it.
 */
public interface Journal extends AutoCloseable {
  /** The id of this store, made once. */
  String store();

  /** All entries in order, each checked against its chain as it is read. */
  List<Recorded> read();

  /**
   * Raises the instrument's fence by one, durably, and returns it. Every commit under a lower fence
   * is refused from here on.
   */
  long raiseFence(String instrument, Instant at);

  /**
   * Stores all entries, or none.
   *
   * @param fence the caller's fence; refused when another daemon has raised it since
   * @param at the moment that is written beside each
   * @param entries at least one
   * @return the entries as they now stand, in order
   * @throws JournalException when they were not stored, or it is not known
   */
  List<Recorded> commit(long fence, Instant at, List<Entry> entries);

  @Override
  void close();
}
