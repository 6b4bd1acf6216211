package beamwarden.simulated;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.instrument.CurrentReading;
import beamwarden.instrument.DataFile;
import beamwarden.instrument.Fault;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.Receipt;
import beamwarden.quantity.Current;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Notes on disk: each is read back, also from the short form into which they are rewritten. */
class NotesTest {
  private static final Receipt RECEIPT =
      new Receipt(
          2,
          7,
          100,
          101,
          Duration.ofNanos(2_512_345_678L),
          Optional.of(new CurrentReading(Lab.GENTLE, new Current(3.4567890123456e-10))),
          Optional.of(new CurrentReading(Lab.GENTLE, new Current(3.6e-10))),
          Map.of("violet", 123_456L, "", 0L),
          List.of(new DataFile("/data/a b%.pgm", "image/x-portable-graymap", 17, "ab12")),
          Optional.of(new Fault(FaultKind.DETECTOR_TIMEOUT, "it said \"nothing\", für immer\n")));

  @TempDir Path folder;
  private Path file;

  @BeforeEach
  void noteAll() {
    file = folder.resolve("adapter.notes");
    Notes notes = Notes.in(file);
    notes.seal(5, "store b", Set.of());
    notes.begun(2);
    notes.seal(7, "store-a", Set.of(40L, 41L));
    for (long grant : new long[] {1, 2, 3, 9}) {
      notes.begun(grant);
    }
    notes.keep(RECEIPT);
  }

  @Test
  void areReadBack() {
    assertAllThere(Notes.in(file));
  }

  @Test
  void areReadBackFromTheirShortForm() throws IOException {
    Notes.in(file);
    Notes.in(file);
    assertAllThere(Notes.in(file));
    // Two seals, three ranges of begun grants, one receipt.
    assertEquals(6, Files.readAllLines(file).size());
  }

  @Test
  void keepWhatTheOtherStoreDid() {
    Notes.in(file);
    Notes again = Notes.in(file);
    assertTrue(again.knows("store b"));
    assertFalse(again.knows("store c"));
    again.seal(8, "store b", Set.of());
    assertTrue(again.hasBegun(2));
    assertFalse(again.hasBegun(1));
    assertEquals(Optional.empty(), again.kept(2));
  }

  @Test
  void forgetWhatARaisedFenceForbidsAnyway() {
    Notes notes = Notes.in(file);
    notes.seal(7, "store-a", Set.of(42L));
    assertTrue(notes.isForbidden(40) && notes.isForbidden(42));
    notes.seal(8, "store-a", Set.of());
    assertFalse(notes.isForbidden(40));
  }

  @Test
  void forgetAnAcknowledgedReceiptAndStillKnowThatItBegan() {
    Notes.in(file).forget(2);
    Notes again = Notes.in(file);
    assertEquals(Optional.empty(), again.kept(2));
    assertTrue(again.hasBegun(2));
  }

  @Test
  void surviveALastLineThatIsTornAnywhere() throws IOException {
    String whole = Files.readString(file);
    Notes.in(file).begun(50);
    String last = Words.line(List.of("begun", 50, 50));
    for (int length = 0; length <= last.length(); length++) {
      Files.writeString(file, whole + last.substring(0, length));
      Notes notes = Notes.in(file);
      assertAllThere(notes);
      assertFalse(notes.hasBegun(50));
    }
  }

  @Test
  void refuseALineThatIsDamaged() throws IOException {
    Files.writeString(file, "begun 77 77 0\n", StandardOpenOption.APPEND);
    assertEquals(
        "the line does not carry its checksum: begun 77 77 0",
        assertThrows(IllegalArgumentException.class, () -> Notes.in(file)).getMessage());
  }

  @Test
  void refuseALineOfAnUnknownKind() throws IOException {
    Files.writeString(file, Words.line(List.of("granted", 1)) + "\n", StandardOpenOption.APPEND);
    assertEquals(
        "the adapter's notes hold a line of an unknown kind: granted",
        assertThrows(IllegalArgumentException.class, () -> Notes.in(file)).getMessage());
  }

  private static void assertAllThere(Notes notes) {
    assertEquals(7, notes.fence());
    assertEquals("store-a", notes.store());
    for (long grant : new long[] {1, 2, 3, 9}) {
      assertTrue(notes.hasBegun(grant));
    }
    assertFalse(notes.hasBegun(4));
    assertTrue(notes.isForbidden(40) && notes.isForbidden(41));
    assertEquals(Optional.of(RECEIPT), notes.kept(2));
  }
}
