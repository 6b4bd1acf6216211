package beamwarden.store;

import static beamwarden.store.Examples.AT;
import static beamwarden.store.Examples.noted;
import static beamwarden.store.Examples.voided;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.ledger.ChainHash;
import beamwarden.ledger.Entry;
import beamwarden.ledger.JournalException;
import beamwarden.ledger.Recorded;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.sql.Connection;
import java.sql.DriverManager;
import java.sql.SQLException;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.extension.RegisterExtension;
import org.junit.jupiter.api.function.Executable;

class SqliteJournalTest {
  private static final String ROOM = "north-room";

  @RegisterExtension final StoreExtension store = new StoreExtension();

  private static void assertRefused(String message, Executable attempt) {
    assertEquals(message, assertThrows(JournalException.class, attempt).getMessage());
  }

  @Nested
  class Storing {
    @Test
    void givesBackEveryKindOfEntryAfterReopening() {
      List<Recorded> stored;
      try (SqliteJournal journal = SqliteJournal.open(store.folder())) {
        long fence = journal.raiseFence(ROOM, AT);
        stored = journal.commit(fence, AT, Examples.all());
      }
      List<Recorded> read = store.open().read();
      assertEquals(stored, read.subList(1, read.size()));
      assertEquals(Examples.all(), stored.stream().map(Recorded::entry).toList());
    }

    @Test
    void numbersEntriesFromOneOnWithoutAGap() {
      SqliteJournal journal = store.open();
      long fence = journal.raiseFence(ROOM, AT);
      journal.commit(fence, AT, List.of(noted("a"), noted("b")));
      journal.commit(fence, AT, List.of(noted("c")));
      assertEquals(List.of(1L, 2L, 3L, 4L), journal.read().stream().map(Recorded::number).toList());
    }

    @Test
    void chainsTheEntriesOfEachSampleApart() {
      SqliteJournal journal = store.open();
      long fence = journal.raiseFence(ROOM, AT);
      List<Recorded> stored =
          journal.commit(fence, AT, List.of(voided(1, "a"), voided(2, "b"), voided(3, "a")));
      String first = ChainHash.genesis(journal.store(), "a");
      String one = hashAfter(first, stored.get(0));
      assertEquals(one, stored.get(0).hash());
      assertEquals(hashAfter(one, stored.get(2)), stored.get(2).hash());
      assertEquals(
          hashAfter(ChainHash.genesis(journal.store(), "b"), stored.get(1)), stored.get(1).hash());
    }

    private String hashAfter(String previous, Recorded recorded) {
      return ChainHash.entry(
          previous,
          recorded.number(),
          recorded.at().toString(),
          recorded.fence(),
          recorded.entry().chain(),
          "grant-voided",
          1,
          EntryJson.write(recorded.entry()));
    }

    @Test
    void keepsItsIdAndGivesAnotherStoreAnother() throws IOException {
      String id;
      try (SqliteJournal journal = SqliteJournal.open(store.folder())) {
        id = journal.store();
      }
      assertEquals(id, store.open().store());
      Path other = Files.createDirectory(store.folder().resolve("other"));
      try (SqliteJournal journal = SqliteJournal.open(other)) {
        assertNotEquals(id, journal.store());
      }
    }

    @Test
    void needsAtLeastOneEntryAndGoesOnWithoutOne() {
      SqliteJournal journal = store.open();
      long fence = journal.raiseFence(ROOM, AT);
      assertThrows(IllegalArgumentException.class, () -> journal.commit(fence, AT, List.of()));
      assertEquals(1, journal.commit(fence, AT, List.of(noted("still open"))).size());
    }
  }

  @Nested
  class Fences {
    @Test
    void riseByOneAndAreEntriesThemselves() {
      SqliteJournal journal = store.open();
      assertEquals(1, journal.raiseFence(ROOM, AT));
      assertEquals(2, journal.raiseFence(ROOM, AT));
      assertEquals(
          List.of(new Entry.FenceRaised(1, ROOM), new Entry.FenceRaised(2, ROOM)),
          journal.read().stream().map(Recorded::entry).toList());
    }

    @Test
    void goOnRisingAfterReopening() {
      try (SqliteJournal journal = SqliteJournal.open(store.folder())) {
        journal.raiseFence(ROOM, AT);
      }
      assertEquals(2, store.open().raiseFence(ROOM, AT));
    }

    @Test
    void ofTwoInstrumentsAreNeverTheSame() {
      SqliteJournal journal = store.open();
      long north = journal.raiseFence(ROOM, AT);
      long south = journal.raiseFence("south-room", AT);
      assertEquals(List.of(1L, 2L), List.of(north, south));
      journal.commit(north, AT, List.of(noted("both")));
      journal.commit(south, AT, List.of(noted("hold")));
    }

    @Test
    void refuseACommitUnderALowerOne() {
      SqliteJournal journal = store.open();
      long old = journal.raiseFence(ROOM, AT);
      journal.raiseFence(ROOM, AT);
      assertRefused(
          "the fence 1 does not hold any longer, but {north-room=2}: another daemon has taken over,"
              + " so this one must stop",
          () -> journal.commit(old, AT, List.of(noted("late"))));
      assertEquals(2, journal.read().size());
    }

    @Test
    void refuseACommitUnderOneThatWasNeverRaised() {
      SqliteJournal journal = store.open();
      assertThrows(JournalException.class, () -> journal.commit(7, AT, List.of(noted("invented"))));
      assertEquals(List.of(), journal.read());
    }

    @Test
    void areCheckedInTheTransactionItself() throws SQLException {
      SqliteJournal journal = store.open();
      long fence = journal.raiseFence(ROOM, AT);
      // As another daemon would on a file system whose locks do not hold.
      store.tamper("UPDATE fence SET fence = 2");
      assertThrows(JournalException.class, () -> journal.commit(fence, AT, List.of(noted("late"))));
    }
  }

  @Nested
  class AfterAFailedCommit {
    @Test
    void takesNoMoreEntries() {
      SqliteJournal journal = store.open();
      long fence = journal.raiseFence(ROOM, AT);
      assertThrows(JournalException.class, () -> journal.commit(9, AT, List.of(noted("no"))));
      String refusal =
          "the journal takes no more entries: the fence 9 does not hold any longer, but"
              + " {north-room=1}: another daemon has taken over, so this one must stop";
      assertRefused(refusal, () -> journal.commit(fence, AT, List.of(noted("no"))));
      assertRefused(refusal, () -> journal.raiseFence(ROOM, AT));
    }

    @Test
    void canStillBeRead() {
      SqliteJournal journal = store.open();
      journal.raiseFence(ROOM, AT);
      assertThrows(JournalException.class, () -> journal.commit(9, AT, List.of(noted("no"))));
      assertEquals(1, journal.read().size());
    }
  }

  @Nested
  class TheFileItself {
    private void assertAborts(String message, String sql) {
      SQLException refusal = assertThrows(SQLException.class, () -> store.tamper(sql));
      assertTrue(refusal.getMessage().contains(message), refusal::getMessage);
    }

    private void storeTwo() {
      try (SqliteJournal journal = SqliteJournal.open(store.folder())) {
        long fence = journal.raiseFence(ROOM, AT);
        journal.commit(fence, AT, List.of(noted("a")));
      }
    }

    @Test
    void refusesToChangeAnEntry() {
      storeTwo();
      assertAborts("entries are never changed", "UPDATE entry SET body = '{}' WHERE number = 1");
      assertAborts(
          "entries are numbered without a gap",
          "INSERT OR REPLACE INTO entry SELECT 1, at, fence, chain, kind, format, body, hash"
              + " FROM entry WHERE number = 2");
    }

    @Test
    void refusesToTakeAnEntryOut() {
      storeTwo();
      assertAborts("entries are never taken out", "DELETE FROM entry WHERE number = 2");
      assertAborts("entries are never taken out", "DELETE FROM entry");
    }

    @Test
    void refusesAGapInTheNumbers() {
      storeTwo();
      assertAborts(
          "entries are numbered without a gap",
          "INSERT INTO entry SELECT 4, at, fence, chain, kind, format, body, hash"
              + " FROM entry WHERE number = 2");
    }

    @Test
    void refusesToLowerAFenceOrRenameTheStore() {
      storeTwo();
      assertAborts("a fence only rises", "UPDATE fence SET fence = 1");
      assertAborts("a fence is never taken out", "DELETE FROM fence");
      assertAborts("a store keeps its id", "UPDATE store SET id = 'other'");
      assertAborts("a store keeps its id", "DELETE FROM store");
    }

    @Test
    void isRefusedWhereItsSettingsDoNotHold() throws SQLException {
      try (Connection memory = DriverManager.getConnection("jdbc:sqlite::memory:")) {
        assertRefused(
            "the store's setting journal_mode is memory instead of wal, so that commits would not"
                + " be durable: keep the store on a local disk",
            () -> Database.requireSettings(memory));
      }
    }
  }

  @Nested
  class OpenedTwice {
    @Test
    void isRefused() {
      store.open();
      assertRefused(
          "the store "
              + store.folder()
              + " is open in process "
              + ProcessHandle.current().pid()
              + ": stop that daemon first, or name another folder",
          store::open);
    }

    @Test
    void staysRefusedAfterARefusal() {
      store.open();
      assertThrows(JournalException.class, store::open);
      assertThrows(JournalException.class, store::open);
    }

    @Test
    void isAllowedOnceTheFirstIsClosed() {
      SqliteJournal.open(store.folder()).close();
      store.open().raiseFence(ROOM, AT);
    }
  }

  @Nested
  class OpenedForReading {
    @Test
    void seesWhatTheDaemonHasCommittedSoFar() {
      SqliteJournal journal = store.open();
      long fence = journal.raiseFence(ROOM, AT);
      SqliteJournal reader = store.readOnly();
      assertEquals(journal.read(), reader.read());
      journal.commit(fence, AT, List.of(noted("a"), noted("b")));
      assertEquals(journal.read(), reader.read());
      assertEquals(journal.store(), reader.store());
    }

    @Test
    void seesAStoreWhoseDaemonHasStopped() {
      try (SqliteJournal journal = SqliteJournal.open(store.folder())) {
        journal.raiseFence(ROOM, AT);
      }
      assertEquals(1, store.readOnly().read().size());
    }

    @Test
    void takesNoEntries() {
      store.open().raiseFence(ROOM, AT);
      assertRefused(
          "the journal takes no more entries: it was opened for reading only",
          () -> store.readOnly().commit(1, AT, List.of(noted("no"))));
    }

    @Test
    void needsAStore() {
      assertRefused(
          "there is no store in " + store.folder() + ": name the folder that the daemon was given",
          store::readOnly);
    }

    @Test
    void findsNothingWrongWithASoundStore() {
      SqliteJournal journal = store.open();
      journal.commit(journal.raiseFence(ROOM, AT), AT, Examples.all());
      assertEquals(Optional.empty(), store.readOnly().firstBreak());
    }
  }
}
