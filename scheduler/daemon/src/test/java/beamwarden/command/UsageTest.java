package beamwarden.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.web.FakeDesk;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class UsageTest {
  private final Called.Caller caller = new Called.Caller();

  @ParameterizedTest
  @ValueSource(
      strings = {
        "check",
        "rehearse",
        "serve",
        "submit",
        "watch",
        "hold",
        "release",
        "withdraw",
        "stop",
        "approve",
        "dose",
        "report"
      })
  void everyCommandHasHelpThatFitsEightyColumns(String command) {
    Called called = caller.call(command, "--help");
    assertEquals(0, called.code());
    assertTrue(called.out().startsWith("Usage: beamwarden " + command), called.out());
    assertTrue(called.out().contains("--json"), called.out());
    called.out().lines().forEach(line -> assertTrue(line.length() <= 80, line));
    assertEquals("", called.err());
  }

  @Test
  void theProgramListsItsCommandsAndExitCodes() {
    Called called = caller.call("--help");
    assertEquals(0, called.code());
    assertTrue(called.out().contains("rehearse"), called.out());
    assertTrue(called.out().contains("1 the answer is no"), called.out());
    called.out().lines().forEach(line -> assertTrue(line.length() <= 80, line));
  }

  @ParameterizedTest
  @CsvSource(
      delimiter = '|',
      value = {
        "                                  | a command is missing; try beamwarden --help",
        "frobnicate                        | Unmatched argument at index 0: 'frobnicate'; try"
            + " beamwarden --help",
        "check queue.yaml                  | Missing required option: '--instrument=PROFILE'; try"
            + " beamwarden check --help",
        "serve --instrument a --store b --port 70000 | --port is from 0 to 65535, not 70000",
        "serve --instrument a --store b --pace 0 | --pace must be above zero, not 0.0",
        "serve --instrument a --store b --port x | Invalid value for option '--port': 'x' is not"
            + " an int; try beamwarden serve --help",
        "rehearse a --instrument b --noise loud | Invalid value for option '--noise': expected one"
            + " of [on, off] (case-sensitive) but was 'loud'; try beamwarden rehearse --help",
        "approve placements                | Missing required option: '--reason=TEXT'; try"
            + " beamwarden approve --help",
        "dose                              | Missing required parameter: 'SAMPLE'; try beamwarden"
            + " dose --help",
        "hold --at http://127.0.0.1:1      | name jobs, or all of them with --all; try beamwarden"
            + " hold --help",
        "hold a --all --at http://127.0.0.1:1 | name jobs, or all of them with --all; try"
            + " beamwarden hold --help",
        "report --at nowhere               | nowhere is no address of a daemon; write"
            + " http://127.0.0.1:8080",
        "report yesterday --at http://127.0.0.1:1 | yesterday is no date; write 2031-03-12, the"
            + " day the night opened",
        "watch                             | say where the daemon is, with --at URL, --store DIR or"
            + " the environment variable BEAMWARDEN_STORE"
      })
  void aWrongCallIsToldWhatIsWrongInOneLine(String words, String sentence) {
    Object[] arguments = words == null ? new Object[0] : words.split(" ", -1);
    Called called = caller.call(arguments);
    assertEquals("beamwarden: " + sentence + System.lineSeparator(), called.err());
    assertEquals(2, called.code());
    assertEquals("", called.out());
  }

  @Test
  void aDocumentThatIsNotThereIsAWrongCall() {
    Called called = caller.call("check", "missing.yaml", "--instrument", "missing-too.yaml");
    assertEquals(2, called.code());
    assertEquals(
        "beamwarden: missing.yaml does not exist; check the path" + System.lineSeparator(),
        called.err());
  }

  @Test
  void aFailureOfTheWorldIsASentenceWithoutATrace() {
    caller.workshop.failure =
        java.util.Optional.of(new WorkshopException("the store x is locked; end its daemon"));
    Called called =
        caller.call(
            "check",
            FakeDesk.EXAMPLES.resolve("01-first-look.yaml"),
            "--instrument",
            FakeDesk.EXAMPLES.resolve("north-room.yaml"));
    assertEquals(3, called.code());
    assertEquals(
        "beamwarden: the store x is locked; end its daemon" + System.lineSeparator(), called.err());
  }

  @Test
  void aMistakeOfOursIsASentenceToo() {
    caller.workshop.failure = java.util.Optional.of(new IllegalStateException("out of order"));
    Called called =
        caller.call(
            "check",
            FakeDesk.EXAMPLES.resolve("01-first-look.yaml"),
            "--instrument",
            FakeDesk.EXAMPLES.resolve("north-room.yaml"));
    assertEquals(3, called.code());
    assertFalse(called.err().contains("\tat "), called.err());
    assertTrue(called.err().contains("this should not have happened"), called.err());
  }
}
