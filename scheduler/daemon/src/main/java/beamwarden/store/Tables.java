package beamwarden.store;

import java.sql.Connection;
import java.sql.PreparedStatement;
import java.sql.ResultSet;
import java.sql.SQLException;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;

/** The statements on the tables of a store. Begins and ends no transaction. */
final class Tables {
  private final Connection connection;

  Tables(Connection connection) {
    this.connection = connection;
  }

  /** The store's id, unless it has none yet. */
  Optional<String> storeId() throws SQLException {
    return first("SELECT id FROM store");
  }

  void nameStore(String id) throws SQLException {
    update("INSERT INTO store (only_row, id) VALUES (1, ?)", id);
  }

  /** The fence that holds for each instrument. */
  Map<String, Long> fences() throws SQLException {
    Map<String, Long> fences = new TreeMap<>();
    try (PreparedStatement query =
            connection.prepareStatement("SELECT instrument, fence FROM fence");
        ResultSet rows = query.executeQuery()) {
      while (rows.next()) {
        fences.put(rows.getString(1), rows.getLong(2));
      }
    }
    return fences;
  }

  void raise(String instrument, long fence) throws SQLException {
    update(
        "INSERT INTO fence (instrument, fence) VALUES (?, ?)"
            + " ON CONFLICT (instrument) DO UPDATE SET fence = excluded.fence",
        instrument,
        fence);
  }

  long lastNumber() throws SQLException {
    return first("SELECT max(number) FROM entry").map(Long::valueOf).orElse(0L);
  }

  /** The hash of the last entry of a chain, unless the chain has none. */
  Optional<String> head(String chain) throws SQLException {
    return first("SELECT hash FROM entry WHERE chain = ? ORDER BY number DESC LIMIT 1", chain);
  }

  void add(Row row) throws SQLException {
    update(
        "INSERT INTO entry (number, at, fence, chain, kind, format, body, hash)"
            + " VALUES (?, ?, ?, ?, ?, ?, ?, ?)",
        row.number(),
        row.at(),
        row.fence(),
        row.chain(),
        row.kind(),
        row.format(),
        row.body(),
        row.hash());
  }

  /** What is wrong with the file itself, if anything is. */
  Optional<String> damage() throws SQLException {
    return first("PRAGMA integrity_check(1)").filter(found -> !found.equals("ok"));
  }

  /** Takes the rows one by one, so that long books need not fit into memory twice. */
  interface RowTaker {
    /** Takes one row. */
    void take(Row row);
  }

  /** Hands over all rows in order, as they stood at one moment. */
  void forEach(RowTaker taker) throws SQLException {
    try (PreparedStatement query =
            connection.prepareStatement(
                "SELECT number, at, fence, chain, kind, format, body, hash"
                    + " FROM entry ORDER BY number");
        ResultSet rows = query.executeQuery()) {
      while (rows.next()) {
        taker.take(row(rows));
      }
    }
  }

  private static Row row(ResultSet rows) throws SQLException {
    return new Row(
        rows.getLong("number"),
        rows.getString("at"),
        rows.getLong("fence"),
        rows.getString("chain"),
        rows.getString("kind"),
        rows.getInt("format"),
        rows.getString("body"),
        rows.getString("hash"));
  }

  private Optional<String> first(String sql, Object... values) throws SQLException {
    try (PreparedStatement query = prepared(sql, values);
        ResultSet row = query.executeQuery()) {
      return row.next() ? Optional.ofNullable(row.getString(1)) : Optional.empty();
    }
  }

  private void update(String sql, Object... values) throws SQLException {
    try (PreparedStatement statement = prepared(sql, values)) {
      statement.executeUpdate();
    }
  }

  private PreparedStatement prepared(String sql, Object... values) throws SQLException {
    PreparedStatement statement = connection.prepareStatement(sql);
    for (int index = 0; index < values.length; index++) {
      statement.setObject(index + 1, values[index]);
    }
    return statement;
  }
}
