package beamwarden.store;

import static beamwarden.store.Examples.AT;
import static beamwarden.store.Examples.noted;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import beamwarden.ledger.JournalException;
import java.lang.reflect.InvocationTargetException;
import java.lang.reflect.Method;
import java.lang.reflect.Proxy;
import java.sql.Connection;
import java.sql.PreparedStatement;
import java.sql.SQLException;
import java.sql.Statement;
import java.util.List;
import java.util.function.UnaryOperator;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.extension.RegisterExtension;
import org.sqlite.SQLiteErrorCode;
import org.sqlite.SQLiteException;

/** Goal: a commit that fails in any way is told apart truly, and is the journal's last. */
class TransactionTest {
  @RegisterExtension final StoreExtension store = new StoreExtension();

  private static SQLiteException error(SQLiteErrorCode code) {
    return new SQLiteException(code.toString(), code);
  }

  /** What the disk does when a transaction ends. */
  @FunctionalInterface
  private interface Ending {
    void commit(Statement statement) throws SQLException;
  }

  /**
   * The connection, but with an ending of the test's for every commit after the first {@code n}.
   */
  private static Connection ending(Connection real, int after, Ending ending) {
    int[] left = {after};
    return proxy(
        Connection.class,
        real,
        result ->
            result instanceof Statement statement && !(result instanceof PreparedStatement)
                ? statementEnding(statement, left, ending)
                : result);
  }

  private static Statement statementEnding(Statement real, int[] left, Ending ending) {
    return (Statement)
        Proxy.newProxyInstance(
            Statement.class.getClassLoader(),
            new Class<?>[] {Statement.class},
            (self, method, arguments) -> {
              if (arguments != null && "COMMIT".equals(arguments[0]) && left[0]-- <= 0) {
                ending.commit(real);
                return true;
              }
              return invoke(real, method, arguments);
            });
  }

  private static <T> T proxy(Class<T> type, T real, UnaryOperator<Object> results) {
    return type.cast(
        Proxy.newProxyInstance(
            type.getClassLoader(),
            new Class<?>[] {type},
            (self, method, arguments) -> results.apply(invoke(real, method, arguments))));
  }

  private static Object invoke(Object real, Method method, Object[] arguments) throws Throwable {
    try {
      return method.invoke(real, arguments);
    } catch (InvocationTargetException e) {
      throw e.getCause();
    }
  }

  /** Stores one entry, fails at the second and returns the message; says what is there later. */
  private String failAtSecond(Ending ending, int entriesAfterwards) throws SQLException {
    SqliteJournal.open(store.folder()).close();
    Connection real = Database.forWriting(store.folder().resolve("books.sqlite"));
    String message;
    try (SqliteJournal journal = SqliteJournal.on(ending(real, 2, ending), () -> {})) {
      long fence = journal.raiseFence("north-room", AT);
      journal.commit(fence, AT, List.of(noted("kept")));
      message =
          assertThrows(
                  JournalException.class, () -> journal.commit(fence, AT, List.of(noted("lost?"))))
              .getMessage();
      assertThrows(
          JournalException.class, () -> journal.commit(fence, AT, List.of(noted("too late"))));
    }
    assertEquals(entriesAfterwards, store.open().read().size());
    return message;
  }

  @Test
  void aFullDiskAtTheCommitIsSaidAndNothingIsStored() throws SQLException {
    // As seen on a full disk: the transaction is rolled back already, and ROLLBACK is refused.
    String message =
        failAtSecond(
            statement -> {
              statement.execute("ROLLBACK");
              throw error(SQLiteErrorCode.SQLITE_FULL);
            },
            2);
    assertEquals(
        "an entry could not be stored, the disk is full: make room on it, then start the daemon"
            + " again",
        message);
  }

  @Test
  void aFullDiskBeforeTheCommitIsSaidAndNothingIsStored() throws SQLException {
    SqliteJournal.open(store.folder()).close();
    Connection real = Database.forWriting(store.folder().resolve("books.sqlite"));
    try (SqliteJournal journal = SqliteJournal.on(real, () -> {})) {
      long fence = journal.raiseFence("north-room", AT);
      try (Statement statement = real.createStatement()) {
        statement.execute("PRAGMA max_page_count = 1"); // taken as: no more than there are now
      }
      String large = "x".repeat(100_000);
      assertEquals(
          "2 entries could not be stored, the disk is full: make room on it, then start the daemon"
              + " again",
          assertThrows(
                  JournalException.class,
                  () -> journal.commit(fence, AT, List.of(noted("small"), noted(large))))
              .getMessage());
    }
    assertEquals(1, store.open().read().size());
  }

  @Test
  void anOutcomeThatIsUnknownIsSaidThoughTheEntryWasStored() throws SQLException {
    String message =
        failAtSecond(
            statement -> {
              statement.execute("COMMIT");
              throw error(SQLiteErrorCode.SQLITE_IOERR);
            },
            3);
    assertEquals(
        "it is not known whether an entry could be stored ([SQLITE_IOERR] Some kind of disk"
            + " I/O error occurred): see to the disk, then start the daemon again, which reads"
            + " what is there",
        message);
  }

  @Test
  void anOutcomeThatIsUnknownIsSaidThoughTheEntryWasNotStored() throws SQLException {
    String message =
        failAtSecond(
            statement -> {
              throw error(SQLiteErrorCode.SQLITE_IOERR);
            },
            2);
    assertEquals(
        "it is not known whether an entry could be stored ([SQLITE_IOERR] Some kind of disk"
            + " I/O error occurred): see to the disk, then start the daemon again, which reads"
            + " what is there",
        message);
  }
}
