package beamwarden.ledger;

import java.time.Instant;
import java.util.List;

/**
 * Where the books are kept, durably. One writer.
 *
 * <p>After a commit that threw, the journal takes no more entries: whoever wrote must stop, and
 * read what is there when it starts again.
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
   * Raises the instrument's fence above every fence of this store, durably, together with a {@link
   * Entry.FenceRaised} entry, and returns it. Every commit under the instrument's earlier fences is
   * refused from here on.
   *
   * @param instrument the instrument's name
   * @param at the moment that is written beside the entry
   * @throws JournalException when it was not raised, or it is not known
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
