package beamwarden.store;

import beamwarden.ledger.JournalException;
import java.io.IOException;
import java.io.InputStream;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.sql.Connection;
import java.sql.ResultSet;
import java.sql.SQLException;
import java.sql.Statement;
import java.util.Locale;

/**
 * The tables of a store, brought up to date by numbered steps.
 *
 * <p>Step n is the resource {@code schema-000n.sql}; once released it is never edited. Each step is
 * a transaction of its own, together with its row in {@code schema_version}.
 */
final class Schema {
  /** The lowest version that this program can bring up to date. */
  static final int LOWEST = 1;

  /** The version that this program reads and writes. */
  static final int HIGHEST = 1;

  private static final int EMPTY = 0;

  private Schema() {}

  /** Runs the steps that are missing, all of them in an empty file. */
  static void bringUpToDate(Connection connection) throws SQLException {
    int found = version(connection);
    if (found != EMPTY) {
      requireBetween(found, LOWEST);
    }
    for (int step = found + 1; step <= HIGHEST; step++) {
      take(connection, step);
    }
  }

  /** Refuses a store that has another version: whoever only reads cannot bring it up to date. */
  static void requireUpToDate(Connection connection) throws SQLException {
    requireBetween(version(connection), HIGHEST);
  }

  private static void requireBetween(int found, int lowest) {
    if (found > HIGHEST) {
      throw new JournalException(
          "the store has schema "
              + found
              + ", and this program knows up to "
              + HIGHEST
              + ": use the newer program that wrote it");
    }
    if (found < lowest) {
      throw new JournalException(
          "the store has schema "
              + found
              + ", and this program reads from "
              + lowest
              + " on: start a daemon on it once, which brings it up to date");
    }
  }

  private static int version(Connection connection) throws SQLException {
    if (number(connection, "SELECT count(*) FROM sqlite_schema") == 0) {
      return EMPTY;
    }
    if (number(connection, "SELECT count(*) FROM sqlite_schema WHERE name = 'schema_version'")
        == 0) {
      throw new JournalException("the file is a database, but no store: name another folder");
    }
    return number(connection, "SELECT coalesce(max(version), 0) FROM schema_version");
  }

  private static int number(Connection connection, String query) throws SQLException {
    try (Statement statement = connection.createStatement();
        ResultSet row = statement.executeQuery(query)) {
      return row.getInt(1);
    }
  }

  private static void take(Connection connection, int step) {
    String script = script(step);
    Transaction.run(
        connection,
        "schema " + step,
        () -> {
          try (Statement statement = connection.createStatement()) {
            // The driver hands a whole script to SQLite when it is told to update.
            statement.executeUpdate(script);
            statement.executeUpdate("INSERT INTO schema_version (version) VALUES (" + step + ")");
          }
          return step;
        });
  }

  private static String script(int step) {
    String name = String.format(Locale.ROOT, "schema-%04d.sql", step);
    try (InputStream resource = Schema.class.getResourceAsStream(name)) {
      if (resource == null) {
        throw new IllegalStateException("the program lacks its part " + name);
      }
      return new String(resource.readAllBytes(), StandardCharsets.UTF_8);
    } catch (IOException e) {
      throw new UncheckedIOException("the program's part " + name + " cannot be read", e);
    }
  }
}
