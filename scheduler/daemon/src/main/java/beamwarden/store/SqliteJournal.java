package beamwarden.store;

import beamwarden.ledger.ChainHash;
import beamwarden.ledger.Entry;
import beamwarden.ledger.Journal;
import beamwarden.ledger.JournalException;
import beamwarden.ledger.Recorded;
import java.nio.file.Path;
import java.sql.Connection;
import java.sql.SQLException;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Objects;
import java.util.Optional;
import java.util.UUID;
import java.util.function.Consumer;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/**
 * Books in a folder, in an SQLite file.
 *
 * <p>One daemon holds the folder's {@linkplain #open lock} and writes; any number of others may
 * {@linkplain #readOnly read} meanwhile, each seeing whole commits only. A commit is one
 * transaction and one sync of the disk: {@link #commit} returns when the entries would outlive a
 * loss of power. After a commit that failed this journal takes no more entries.
 *
 * <p>Triggers in the file refuse to change an entry or take one out. The hashes ({@link ChainHash})
 * let that be verified even against someone who drops the triggers.
 *
 * <p>Methods may be called from any thread, one at a time. Whoever reads beside the engine opens
 * the folder read-only, so as not to hold up its commits.
 */
public final class SqliteJournal implements Journal {
  private static final Logger LOGGER = LoggerFactory.getLogger(SqliteJournal.class);
  private static final String READ_ONLY = "it was opened for reading only";

  private final Connection connection;
  private final Tables tables;
  private final String store;
  private final Runnable lastly;

  /** Why no more entries are taken; empty while they are. */
  private String closedBecause = "";

  private SqliteJournal(Connection connection, Runnable lastly) throws SQLException {
    this.connection = connection;
    this.tables = new Tables(connection);
    this.store =
        tables
            .storeId()
            .orElseThrow(
                () -> new JournalException("the store has no id: bring it back from a backup"));
    this.lastly = lastly;
  }

  /**
   * Opens a store for writing, and makes it when the folder holds none.
   *
   * @param folder the store's folder, on a local disk
   * @throws JournalException when another daemon has it open, it was written by a newer program, or
   *     the disk does not do what durable commits need
   */
  public static SqliteJournal open(Path folder) {
    StoreFolder place = new StoreFolder(folder);
    place.make();
    StoreLock lock = StoreLock.take(folder);
    SqliteJournal journal = null;
    try {
      Connection connection = Database.forWriting(place.file());
      journal =
          closedOnFailure(
              connection,
              () -> {
                SqliteJournal opened = on(connection, lock::close);
                place.sync();
                return opened;
              });
    } catch (SQLException e) {
      throw place.cannotBeOpened(e);
    } finally {
      if (journal == null) {
        lock.close();
      }
    }
    LOGGER.atInfo().addKeyValue("store", journal.store).log("Opened the store");
    return journal;
  }

  /**
   * Opens a store to read what it holds, whether or not a daemon has it open.
   *
   * @param folder the store's folder
   * @throws JournalException when there is no store, or another version of this program wrote it
   */
  public static SqliteJournal readOnly(Path folder) {
    StoreFolder place = new StoreFolder(folder);
    place.requireStore();
    try {
      Connection connection = Database.forReading(place.file());
      return closedOnFailure(
          connection,
          () -> {
            Schema.requireUpToDate(connection);
            SqliteJournal journal = new SqliteJournal(connection, () -> {});
            journal.closedBecause = READ_ONLY;
            return journal;
          });
    } catch (SQLException e) {
      throw place.cannotBeOpened(e);
    }
  }

  /** On a connection of the caller's, for writing; {@code lastly} is run when it is closed. */
  static SqliteJournal on(Connection connection, Runnable lastly) throws SQLException {
    Schema.bringUpToDate(connection);
    Tables tables = new Tables(connection);
    if (tables.storeId().isEmpty()) {
      tables.nameStore(UUID.randomUUID().toString());
    }
    return new SqliteJournal(connection, lastly);
  }

  @Override
  public String store() {
    return store;
  }

  @Override
  public synchronized List<Recorded> read() {
    List<Recorded> entries = new ArrayList<>();
    check(entries::add);
    return List.copyOf(entries);
  }

  /**
   * Verifies everything: the file itself, the numbers, every chain and the fences.
   *
   * @return the first thing that is not as it was written, in one sentence; empty when all is well
   */
  public synchronized Optional<String> firstBreak() {
    try {
      check(entry -> {});
      return tables
          .damage()
          .map(found -> "the file is damaged (" + found + "): bring the store back from a backup");
    } catch (JournalException e) {
      return Optional.of(e.getMessage());
    } catch (SQLException e) {
      return Optional.of(unreadable(e).getMessage());
    }
  }

  @Override
  public synchronized long raiseFence(String instrument, Instant at) {
    refuseWhenClosed();
    return guarded(
        "the fence of " + instrument,
        () -> {
          long fence = tables.fences().values().stream().reduce(0L, Math::max) + 1;
          tables.raise(instrument, fence);
          add(fence, at, List.of(new Entry.FenceRaised(fence, instrument)));
          return fence;
        });
  }

  @Override
  public synchronized List<Recorded> commit(long fence, Instant at, List<Entry> entries) {
    if (entries.isEmpty()) {
      throw new IllegalArgumentException("a commit needs at least one entry");
    }
    refuseWhenClosed();
    return guarded(
        entries.size() == 1 ? "an entry" : entries.size() + " entries",
        () -> {
          requireFence(fence);
          return add(fence, at, entries);
        });
  }

  @Override
  public synchronized void close() {
    closedBecause = "it was closed";
    try {
      connection.close();
    } catch (SQLException e) {
      throw new JournalException("the store could not be closed: " + e.getMessage(), e);
    } finally {
      lastly.run();
    }
  }

  private void requireFence(long fence) throws SQLException {
    if (!tables.fences().containsValue(fence)) {
      throw new JournalException(
          "the fence "
              + fence
              + " does not hold any longer, but "
              + tables.fences()
              + ": another daemon has taken over, so this one must stop");
    }
  }

  private List<Recorded> add(long fence, Instant at, List<Entry> entries) throws SQLException {
    long number = tables.lastNumber();
    List<Recorded> added = new ArrayList<>();
    for (Entry entry : entries) {
      String chain = entry.chain();
      String previous = tables.head(chain).orElseGet(() -> ChainHash.genesis(store, chain));
      Row row = row(++number, at, fence, entry).chainedAfter(previous);
      tables.add(row);
      added.add(new Recorded(number, at, fence, entry, row.hash()));
    }
    return List.copyOf(added);
  }

  private static Row row(long number, Instant at, long fence, Entry entry) {
    return new Row(
        number,
        at.toString(),
        fence,
        entry.chain(),
        EntryKind.of(entry).text(),
        EntryJson.FORMAT,
        EntryJson.write(entry),
        "");
  }

  private void check(Consumer<Recorded> taker) {
    BooksCheck check = new BooksCheck(store);
    try {
      Transaction.snapshot(
          connection,
          () -> {
            tables.forEach(row -> taker.accept(check.next(row)));
            check.end(tables.fences());
          });
    } catch (SQLException e) {
      throw unreadable(e);
    }
  }

  private static JournalException unreadable(SQLException e) {
    return new JournalException(
        "the store could not be read (" + e.getMessage() + "): see to the disk", e);
  }

  private <T> T guarded(String what, Transaction.Work<T> work) {
    try {
      return Transaction.run(connection, what, work);
    } catch (RuntimeException e) {
      closedBecause = Objects.requireNonNullElse(e.getMessage(), e.toString());
      LOGGER.atError().addKeyValue("because", closedBecause).log("Closed the journal for good");
      throw e;
    }
  }

  private void refuseWhenClosed() {
    if (!closedBecause.isEmpty()) {
      throw new JournalException("the journal takes no more entries: " + closedBecause);
    }
  }

  private static SqliteJournal closedOnFailure(
      Connection connection, Transaction.Work<SqliteJournal> opening) throws SQLException {
    try {
      return opening.run();
    } catch (SQLException | RuntimeException e) {
      connection.close();
      throw e;
    }
  }
}
