package beamwarden.store;

import beamwarden.ledger.JournalException;
import java.sql.Connection;
import java.sql.SQLException;
import java.sql.Statement;
import org.sqlite.SQLiteErrorCode;

/**
 * Runs work in one transaction, and says truly what became of it.
 *
 * <p>The transaction takes the right to write at its beginning. The statements are written out
 * instead of left to JDBC's own mode: the driver would begin the next transaction within the same
 * call that commits, and a failure of the one could not be told from a failure of the other.
 */
final class Transaction {
  private Transaction() {}

  /** What is done in a transaction. */
  @FunctionalInterface
  interface Work<T> {
    /** Does it. */
    T run() throws SQLException;
  }

  /**
   * Runs {@code work} and commits.
   *
   * @param what what is stored, for messages, such as {@code entries 3 to 4}
   * @throws JournalException when nothing was stored, or it is not known
   */
  static <T> T run(Connection connection, String what, Work<T> work) {
    T result;
    try {
      execute(connection, "BEGIN IMMEDIATE");
      result = work.run();
    } catch (SQLException e) {
      rollBack(connection, e);
      throw notStored(what, e);
    } catch (RuntimeException e) {
      rollBack(connection, e);
      throw e;
    }
    commit(connection, what);
    return result;
  }

  /** What is read in a snapshot. */
  @FunctionalInterface
  interface Reading {
    /** Reads. */
    void run() throws SQLException;
  }

  /** Runs statements that all see the tables as they stood at one moment. */
  static void snapshot(Connection connection, Reading reading) throws SQLException {
    execute(connection, "BEGIN");
    try {
      reading.run();
    } finally {
      execute(connection, "ROLLBACK");
    }
  }

  private static void commit(Connection connection, String what) {
    try {
      execute(connection, "COMMIT");
    } catch (SQLException e) {
      rollBack(connection, e);
      if (is(e, SQLiteErrorCode.SQLITE_FULL) || is(e, SQLiteErrorCode.SQLITE_BUSY)) {
        throw notStored(what, e);
      }
      throw new JournalException(
          "it is not known whether "
              + what
              + " could be stored ("
              + e.getMessage()
              + "): see to the disk, then start the daemon again, which reads what is there",
          e);
    }
  }

  private static JournalException notStored(String what, SQLException e) {
    String advice =
        is(e, SQLiteErrorCode.SQLITE_FULL)
            ? "the disk is full: make room on it, then start the daemon again"
            : e.getMessage() + ": see to the disk, then start the daemon again";
    return new JournalException(what + " could not be stored, " + advice, e);
  }

  /** After a full disk SQLite has already rolled back and says so: no news, and no failure. */
  private static void rollBack(Connection connection, Exception cause) {
    try {
      execute(connection, "ROLLBACK");
    } catch (SQLException e) {
      cause.addSuppressed(e);
    }
  }

  private static boolean is(SQLException e, SQLiteErrorCode code) {
    return e.getErrorCode() == code.code;
  }

  private static void execute(Connection connection, String sql) throws SQLException {
    try (Statement statement = connection.createStatement()) {
      statement.execute(sql);
    }
  }
}
