package beamwarden.store;

import static beamwarden.store.Examples.AT;
import static beamwarden.store.Examples.noted;
import static beamwarden.store.Examples.voided;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import beamwarden.ledger.JournalException;
import java.sql.SQLException;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.extension.RegisterExtension;

/** Goal: what someone did to the file past all triggers is found, and named by its row. */
class TamperedBooksTest {
  @RegisterExtension final StoreExtension store = new StoreExtension();

  /** 1 the fence, 2 and 4 of sample a, 3 of sample b, 5 a note. */
  @BeforeEach
  void writeBooks() throws SQLException {
    try (SqliteJournal journal = SqliteJournal.open(store.folder())) {
      long fence = journal.raiseFence("north-room", AT);
      journal.commit(
          fence, AT, List.of(voided(1, "a"), voided(2, "b"), voided(3, "a"), noted("an end")));
    }
    store.tamper(
        "DROP TRIGGER entry_is_never_changed",
        "DROP TRIGGER entry_is_never_taken_out",
        "DROP TRIGGER entry_is_added_at_the_end",
        "DROP TRIGGER fence_only_rises",
        "DROP TRIGGER store_is_never_renamed");
  }

  private void assertBreak(String message) {
    assertEquals(Optional.of(message), store.readOnly().firstBreak());
    JournalException refusal = assertThrows(JournalException.class, () -> store.open().read());
    assertEquals(message, refusal.getMessage());
  }

  private static String changed(long entry, String chain) {
    return "the books are broken, entry "
        + entry
        + " does not verify: it, or an earlier one of "
        + chain
        + ", was changed: bring the store back from a backup";
  }

  @Test
  void aChangedByteIsFound() throws SQLException {
    store.tamper("UPDATE entry SET body = replace(body, '\"grant\":2', '\"grant\":8')");
    assertBreak(changed(3, "the chain of sample b"));
  }

  @Test
  void aChangedMomentIsFound() throws SQLException {
    store.tamper("UPDATE entry SET at = '2031-03-12T19:00:01Z' WHERE number = 2");
    assertBreak(changed(2, "the chain of sample a"));
  }

  @Test
  void aChangedFenceKindOrFormatIsFound() throws SQLException {
    store.tamper("UPDATE entry SET fence = 2 WHERE number = 5");
    assertBreak(changed(5, "the general chain"));
    store.tamper("UPDATE entry SET fence = 1, kind = 'approved' WHERE number = 5");
    assertEquals(Optional.of(changed(5, "the general chain")), store.readOnly().firstBreak());
    store.tamper("UPDATE entry SET kind = 'noted', format = 2 WHERE number = 5");
    assertEquals(Optional.of(changed(5, "the general chain")), store.readOnly().firstBreak());
  }

  @Test
  void anEntryMovedToAnotherSampleIsFound() throws SQLException {
    store.tamper("UPDATE entry SET chain = 'b' WHERE number = 4");
    assertBreak(changed(4, "the chain of sample b"));
  }

  @Test
  void aRowThatWasTakenOutIsFound() throws SQLException {
    store.tamper("DELETE FROM entry WHERE number = 3");
    assertBreak(
        "the books are broken, entry 3 is missing: after 2 comes 4: bring the store back from a"
            + " backup");
  }

  @Test
  void aRowThatWasTakenOutAndClosedUpIsFound() throws SQLException {
    store.tamper(
        "DELETE FROM entry WHERE number = 2",
        "UPDATE entry SET number = 2 WHERE number = 3",
        "UPDATE entry SET number = 3 WHERE number = 4",
        "UPDATE entry SET number = 4 WHERE number = 5");
    assertBreak(changed(2, "the chain of sample b"));
  }

  @Test
  void twoRowsThatChangedPlacesAreFound() throws SQLException {
    store.tamper(
        "UPDATE entry SET number = 9 WHERE number = 2",
        "UPDATE entry SET number = 2 WHERE number = 4",
        "UPDATE entry SET number = 4 WHERE number = 9");
    assertBreak(changed(2, "the chain of sample a"));
  }

  @Test
  void booksOfAnotherStoreAreFound() throws SQLException {
    store.tamper("UPDATE store SET id = 'another'");
    assertBreak(changed(1, "the general chain"));
  }

  @Test
  void aFenceThatWasSetBackIsFound() throws SQLException {
    store.tamper("UPDATE fence SET fence = 7");
    assertBreak(
        "the books are broken, the fences are {north-room=7}, but the entries say {north-room=1}:"
            + " bring the store back from a backup");
  }
}
