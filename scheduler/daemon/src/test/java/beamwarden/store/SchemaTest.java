package beamwarden.store;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import beamwarden.ledger.JournalException;
import java.sql.SQLException;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.extension.RegisterExtension;
import org.junit.jupiter.api.function.Executable;

class SchemaTest {
  @RegisterExtension final StoreExtension store = new StoreExtension();

  private static void assertRefused(String message, Executable attempt) {
    assertEquals(message, assertThrows(JournalException.class, attempt).getMessage());
  }

  @Test
  void refusesAStoreOfANewerProgram() throws SQLException {
    SqliteJournal.open(store.folder()).close();
    store.tamper("INSERT INTO schema_version (version) VALUES (2)");
    String message =
        "the store has schema 2, and this program knows up to 1: use the newer program that wrote"
            + " it";
    assertRefused(message, store::open);
    assertRefused(message, store::readOnly);
  }

  @Test
  void refusesAStoreThatIsTooOld() throws SQLException {
    SqliteJournal.open(store.folder()).close();
    store.tamper("UPDATE schema_version SET version = 0");
    String message =
        "the store has schema 0, and this program reads from 1 on: start a daemon on it once, which"
            + " brings it up to date";
    assertRefused(message, store::readOnly);
  }

  @Test
  void refusesADatabaseThatIsNoStore() throws SQLException {
    store.tamper("CREATE TABLE groceries (name TEXT)");
    assertRefused("the file is a database, but no store: name another folder", store::open);
  }

  @Test
  void leavesAStoreThatIsUpToDateAlone() {
    SqliteJournal.open(store.folder()).close();
    assertEquals(List.of(), store.open().read());
  }
}
