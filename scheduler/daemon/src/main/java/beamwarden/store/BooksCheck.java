package beamwarden.store;

import beamwarden.ledger.ChainHash;
import beamwarden.ledger.Entry;
import beamwarden.ledger.JournalException;
import beamwarden.ledger.Recorded;
import java.time.DateTimeException;
import java.time.Instant;
import java.util.HashMap;
import java.util.Map;
import java.util.TreeMap;

/**
 * Verifies books row by row, from the first on, and names the first that is not as it was written.
 *
 * <p>Finds every changed row, and every row that was taken out, put in or moved, as long as the
 * last row of its chain is still there. Rows cut off at the very end leave no trace in the store
 * itself: only an adapter or a data file that carries the lost head can tell.
 */
final class BooksCheck {
  private static final String ADVICE = ": bring the store back from a backup";

  private final String store;
  private final Map<String, String> heads = new HashMap<>();
  private final Map<String, Long> fences = new TreeMap<>();
  private long last;

  BooksCheck(String store) {
    this.store = store;
  }

  /**
   * Checks the next row.
   *
   * @return what it holds
   * @throws JournalException when it is not as it was written
   */
  Recorded next(Row row) {
    if (row.number() != last + 1) {
      throw broken("entry " + (last + 1) + " is missing: after " + last + " comes " + row.number());
    }
    String previous = heads.computeIfAbsent(row.chain(), chain -> ChainHash.genesis(store, chain));
    if (!row.hashAfter(previous).equals(row.hash())) {
      throw broken(
          "entry "
              + row.number()
              + " does not verify: it, or an earlier one of "
              + name(row.chain())
              + ", was changed");
    }
    Recorded recorded = decoded(row);
    last = row.number();
    heads.put(row.chain(), row.hash());
    if (recorded.entry() instanceof Entry.FenceRaised raised) {
      fences.put(raised.instrument(), raised.fence());
    }
    return recorded;
  }

  /** Checks what is kept beside the entries, once the last row was seen. */
  void end(Map<String, Long> storedFences) {
    if (!fences.equals(storedFences)) {
      throw broken("the fences are " + storedFences + ", but the entries say " + fences);
    }
  }

  private static Recorded decoded(Row row) {
    try {
      Entry entry = EntryJson.read(row.kind(), row.format(), row.body());
      return new Recorded(row.number(), Instant.parse(row.at()), row.fence(), entry, row.hash());
    } catch (IllegalArgumentException | DateTimeException e) {
      throw new JournalException(
          "entry "
              + row.number()
              + " cannot be read ("
              + e.getMessage()
              + "): use the program that wrote it, or a newer one",
          e);
    }
  }

  private static String name(String chain) {
    return chain.equals(Entry.GENERAL) ? "the general chain" : "the chain of sample " + chain;
  }

  private static JournalException broken(String what) {
    return new JournalException("the books are broken, " + what + ADVICE);
  }
}
