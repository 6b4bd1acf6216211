package beamwarden.store;

import beamwarden.ledger.JournalException;
import java.nio.file.Path;
import java.sql.Connection;
import java.sql.ResultSet;
import java.sql.SQLException;
import java.sql.Statement;
import java.util.LinkedHashMap;
import java.util.Map;
import org.sqlite.SQLiteConfig;

/**
 * Opens the SQLite file, and makes sure that it is as durable as asked.
 *
 * <p>Write-ahead log with a sync of the log on every commit: an acknowledged commit outlives a
 * killed process and a loss of power, as far as disk and file system keep what they promise. The
 * log needs a local file system.
 */
final class Database {
  /** How long a statement waits for another process, such as a backup, to let go of the file. */
  static final int BUSY_TIMEOUT_MILLIS = 5000;

  private static final Map<String, String> WANTED = new LinkedHashMap<>();

  static {
    WANTED.put("journal_mode", "wal");
    WANTED.put("synchronous", "2"); // FULL
    WANTED.put("foreign_keys", "1");
    WANTED.put("busy_timeout", Integer.toString(BUSY_TIMEOUT_MILLIS));
  }

  private Database() {}

  /** Opens the file, which is made when it is missing. */
  static Connection forWriting(Path file) throws SQLException {
    SQLiteConfig config = config();
    config.setJournalMode(SQLiteConfig.JournalMode.WAL);
    config.setSynchronous(SQLiteConfig.SynchronousMode.FULL);
    config.setTransactionMode(SQLiteConfig.TransactionMode.IMMEDIATE);
    Connection connection = config.createConnection(url(file));
    try {
      requireSettings(connection);
      return connection;
    } catch (SQLException | RuntimeException e) {
      connection.close();
      throw e;
    }
  }

  /** Opens the file, which exists, so that nothing can be changed through the connection. */
  static Connection forReading(Path file) throws SQLException {
    SQLiteConfig config = config();
    config.setReadOnly(true);
    return config.createConnection(url(file));
  }

  private static SQLiteConfig config() {
    SQLiteConfig config = new SQLiteConfig();
    config.setBusyTimeout(BUSY_TIMEOUT_MILLIS);
    config.enforceForeignKeys(true);
    return config;
  }

  private static String url(Path file) {
    return "jdbc:sqlite:" + file;
  }

  /** Reads every setting back: SQLite passes over one that it cannot keep. */
  static void requireSettings(Connection connection) throws SQLException {
    for (Map.Entry<String, String> wanted : WANTED.entrySet()) {
      String found = setting(connection, wanted.getKey());
      if (!found.equals(wanted.getValue())) {
        throw new JournalException(
            "the store's setting "
                + wanted.getKey()
                + " is "
                + found
                + " instead of "
                + wanted.getValue()
                + ", so that commits would not be durable: keep the store on a local disk");
      }
    }
  }

  private static String setting(Connection connection, String name) throws SQLException {
    try (Statement statement = connection.createStatement();
        ResultSet row = statement.executeQuery("PRAGMA " + name)) {
      return row.next() ? row.getString(1) : "nothing";
    }
  }
}
