package beamwarden.ledger;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import beamwarden.ledger.MemoryJournal.Failure;
import java.time.Instant;
import java.util.ArrayDeque;
import java.util.Deque;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;

class MemoryJournalTest {
  private static final Instant AT = Instant.parse("2031-03-12T19:00:00Z");
  private static final String ROOM = "north-room";

  private final MemoryJournal journal = new MemoryJournal("store-1");

  private static Entry noted(String text) {
    return new Entry.Noted(Entry.Noted.What.SHIFT_OPENED, text);
  }

  private static Entry voided(long grant, String sample) {
    return new Entry.GrantVoided(grant, sample, false, "never begun");
  }

  private static List<Long> numbers(Journal journal) {
    return journal.read().stream().map(Recorded::number).toList();
  }

  @Test
  void numbersEntriesFromOneOn() {
    long fence = journal.raiseFence(ROOM, AT);
    journal.commit(fence, AT, List.of(noted("a"), noted("b")));
    assertEquals(List.of(1L, 2L, 3L), numbers(journal));
    assertEquals(new Entry.FenceRaised(1, ROOM), journal.read().get(0).entry());
  }

  @Test
  void chainsTheEntriesOfEachSampleApart() {
    long fence = journal.raiseFence(ROOM, AT);
    List<Recorded> stored =
        journal.commit(fence, AT, List.of(voided(1, "a"), voided(2, "b"), voided(3, "a")));
    Recorded third = stored.get(2);
    assertEquals(
        ChainHash.entry(
            stored.get(0).hash(),
            third.number(),
            AT.toString(),
            fence,
            "a",
            "GrantVoided",
            1,
            third.entry().toString()),
        third.hash());
  }

  @Test
  void refusesACommitUnderALowerFenceAndTakesNoMore() {
    long old = journal.raiseFence(ROOM, AT);
    long fence = journal.raiseFence(ROOM, AT);
    assertThrows(JournalException.class, () -> journal.commit(old, AT, List.of(noted("late"))));
    assertThrows(JournalException.class, () -> journal.commit(fence, AT, List.of(noted("no"))));
    assertEquals(2, journal.read().size());
  }

  @Test
  void refusesACommitWithoutEntries() {
    long fence = journal.raiseFence(ROOM, AT);
    assertThrows(IllegalArgumentException.class, () -> journal.commit(fence, AT, List.of()));
  }

  @Test
  void failsBeforeOrAfterStoringAndGoesOnOnceReopened() {
    Deque<Failure> failures =
        new ArrayDeque<>(List.of(Failure.BEFORE_STORING, Failure.AFTER_STORING));
    MemoryJournal failing =
        new MemoryJournal("store-1", entries -> Optional.ofNullable(failures.poll()));
    long first = failing.raiseFence(ROOM, AT);
    assertThrows(JournalException.class, () -> failing.commit(first, AT, List.of(noted("a"))));
    assertThrows(JournalException.class, () -> failing.raiseFence(ROOM, AT));
    assertEquals(List.of(1L), numbers(failing));

    MemoryJournal again = failing.reopened();
    long second = again.raiseFence(ROOM, AT);
    assertEquals(2, second);
    assertThrows(
        JournalException.class, () -> again.commit(second, AT, List.of(noted("b"), noted("c"))));
    assertEquals(List.of(1L, 2L, 3L, 4L), numbers(again.reopened()));
  }
}
