package beamwarden.store;

import static java.util.stream.Collectors.counting;
import static java.util.stream.Collectors.groupingBy;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.ledger.Entry;
import beamwarden.ledger.JournalException;
import beamwarden.ledger.Recorded;
import java.io.BufferedReader;
import java.io.IOException;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Random;
import java.util.concurrent.TimeUnit;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.Timeout;
import org.junit.jupiter.api.extension.RegisterExtension;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/**
 * Goal: whatever was acknowledged outlives a killed process, and no commit is ever there in part.
 * Method: a process that stores entries is killed at a random moment, the store is read, and the
 * next process goes on in it as it was left. Seeded; a run with a seed of your own: {@code
 * -Dbeamwarden.seed=N}.
 */
class KilledWriterIT {
  private static final Logger LOGGER = LoggerFactory.getLogger(KilledWriterIT.class);
  private static final int ROUNDS = 10;
  private static final int LONGEST_LIFE_MILLIS = 300;
  private static final long SEED = Long.getLong("beamwarden.seed", 20_310_312L);

  @RegisterExtension final StoreExtension store = new StoreExtension();

  @Test
  @Timeout(300)
  void losesNothingThatWasAcknowledged() throws IOException, InterruptedException {
    Random random = new Random(SEED);
    long entries = 0;
    for (int round = 1; round <= ROUNDS; round++) {
      long acknowledged = killedAfter(random.nextInt(LONGEST_LIFE_MILLIS));
      entries = check(round, acknowledged);
      assertTrue(acknowledged > 0, "the process of round " + round + " stored nothing");
    }
    LOGGER
        .atInfo()
        .addKeyValue("seed", SEED)
        .addKeyValue("rounds", ROUNDS)
        .addKeyValue("entries", entries)
        .log("Killed and reopened");
  }

  /** Kills a writer some time after its first commit, and returns what it acknowledged last. */
  private long killedAfter(int millis) throws IOException, InterruptedException {
    Process writer = WriterProcess.start(store.folder(), Integer.MAX_VALUE, List.of());
    try (BufferedReader output = writer.inputReader()) {
      long first = WriterProcess.firstAcknowledged(output);
      Thread killer = new Thread(() -> kill(writer, millis), "killer");
      killer.start();
      long last = WriterProcess.lastAcknowledged(output, first);
      killer.join();
      writer.waitFor();
      return last;
    }
  }

  /** Waits, as a real process can be hit at a random moment in no other way, and kills it. */
  private static void kill(Process writer, int millis) {
    try {
      TimeUnit.MILLISECONDS.sleep(millis);
    } catch (InterruptedException e) {
      Thread.currentThread().interrupt();
    }
    // Unlike Process.destroyForcibly this leaves the output open, to be read to its end.
    writer.toHandle().destroyForcibly();
  }

  private long check(int round, long acknowledged) {
    String where = "seed " + SEED + ", round " + round;
    try (SqliteJournal reader = SqliteJournal.readOnly(store.folder())) {
      List<Recorded> read = reader.read();
      assertTrue(read.size() >= acknowledged, where + ": " + acknowledged + " of " + read.size());
      assertEquals(Optional.empty(), reader.firstBreak(), where);
      assertWhole(read, where);
      return read.size();
    }
  }

  private static void assertWhole(List<Recorded> read, String where) {
    Map<String, Long> entriesByCommit =
        read.stream()
            .map(Recorded::entry)
            .filter(Entry.Noted.class::isInstance)
            .map(entry -> ((Entry.Noted) entry).text())
            .collect(groupingBy(text -> text, counting()));
    entriesByCommit.forEach(
        (commit, count) -> assertTrue(commit.endsWith("/" + count), where + ": part of " + commit));
  }

  @Test
  @Timeout(60)
  void aSecondDaemonIsRefusedWhileTheFirstLives() throws IOException, InterruptedException {
    Process writer = WriterProcess.start(store.folder(), Integer.MAX_VALUE, List.of());
    try (BufferedReader output = writer.inputReader()) {
      WriterProcess.firstAcknowledged(output);
      JournalException refusal = assertThrows(JournalException.class, store::open);
      assertEquals(
          "the store "
              + store.folder()
              + " is open in process "
              + writer.pid()
              + ": stop that daemon first, or name another folder",
          refusal.getMessage());
      assertTrue(store.readOnly().read().size() > 0);
    } finally {
      writer.toHandle().destroyForcibly();
      writer.waitFor();
    }
    assertEquals(2, store.open().raiseFence("north-room", Examples.AT));
  }
}
