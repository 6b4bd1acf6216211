package beamwarden.kit;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.params.provider.Arguments.arguments;

import java.util.Map;
import java.util.Set;
import java.util.function.Function;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;

/** The suite finds the promise that an adapter breaks, and nothing else. */
class BadInstrumentsTest {
  private static final int PROMISES = 18;

  @Test
  void findsThatAnAdapterHasNoLease() {
    finds(
        BadAtExposing::hasNoLease,
        Map.of("P7", "without a heartbeat an exposure ended with Optional.empty"));
  }

  @Test
  void findsThatAnAdapterStartsASealedGrantLate() {
    finds(
        BadAtAnswering::startsASealedGrantLate,
        Map.of("P10", "a grant began that must not (a seal forbade it)"));
  }

  @Test
  void findsThatAnAdapterExposesTwice() {
    finds(BadAtExposing::exposesTwice, Map.of("P2", "grant 1 began twice"));
  }

  @Test
  void findsThatAnAdapterSaysNeverBegunForUnknown() {
    // Whether nothing was noted (P3) or the note was passed over (P11) looks alike from outside.
    finds(
        BadAtAnswering::saysNeverBegunForUnknown,
        Map.of(
            "P3", "an exposure that had begun was said never to have begun",
            "P11", "an exposure that was acknowledged was said never to have begun"));
  }

  @Test
  void findsThatAnAdapterIgnoresTheStop() {
    finds(BadAtExposing::ignoresTheStop, Map.of("P6", "asked to stop went on to its end"));
  }

  @Test
  void findsThatAReceiptIsSmallerThanWhatWasDelivered() {
    finds(BadAtExposing::reportsLessTime, Map.of("P13", "hides a beam that was on for"));
  }

  @ParameterizedTest
  @MethodSource("others")
  void findsEachOtherWayToBreakAPromise(
      Function<PlainRig, PlainInstrument> bad, Map<String, String> broken) {
    finds(bad, broken);
  }

  static Stream<Arguments> others() {
    return Stream.of(
        bad(BadAtExposing::letsStrayBeamThrough, Map.of("P1", "without a grant")),
        bad(
            BadAtExposing::exposesTwiceInSilence,
            Map.of("P2", "again", "P4", "on for", "P13", "hides")),
        bad(BadAtExposing::takesTheLastFirst, Map.of("P2", "in another order than begun")),
        bad(BadAtExposing::notesAfterwards, Map.of("P3", "never", "P11", "when the adapter died")),
        bad(BadAtExposing::ignoresTheGrantsTime, Map.of("P4", "the beam was on for")),
        bad(BadAtExposing::blanksTooLate, Map.of("P4", "the beam was on for")),
        bad(BadAtExposing::ignoresTheCurrent, Map.of("P5", "ended with Optional.empty")),
        bad(BadAtExposing::startsWhatWaitedForAStop, Map.of("P6", "when the stop came")),
        bad(BadAtExposing::stopsInTheMiddleOfALine, Map.of("P6", "left a line half done")),
        bad(BadAtExposing::doesNotRenewTheLease, Map.of("P7", "renewed in time has ended")),
        bad(BadAtAnswering::ignoresTheLatestStart, Map.of("P8", "its latest start had passed")),
        bad(BadAtAnswering::looksAtTheLatestStartTooEarly, Map.of("P8", "another exposure ran")),
        bad(BadAtAnswering::startsUnsealed, Map.of("P9", "since the adapter was connected")),
        bad(BadAtAnswering::ignoresTheFence, Map.of("P9", "lower", "P10", "sealed away")),
        bad(BadAtAnswering::ignoresTheStore, Map.of("P9", "it is of another store")),
        bad(BadAtAnswering::ignoresTheSession, Map.of("P9", "it is of another session")),
        bad(
            BadAtAnswering::answersASealBeforeItBlanks,
            Map.of("P10", "the seal had been answered")),
        bad(BadAtAnswering::isSealedByAnybody, Map.of("P10", "in spite of a lower fence")),
        bad(BadAtAnswering::forgetsItsFenceWithItsProcess, Map.of("P10", "a lower fence")),
        bad(BadAtAnswering::tellsOneStoreOfAnother, Map.of("P11", "another store was given")),
        bad(BadAtAnswering::forgetsReceiptsWithItsProcess, Map.of("P12", "a crash and a seal")),
        bad(BadAtExposing::reportsFewerUnits, Map.of("P13", "units hides")),
        bad(BadAtExposing::reportsLessCurrent, Map.of("P13", "A hides 350 pA")),
        bad(BadAtExposing::writesItsDataLate, Map.of("P14", "cannot be read")),
        bad(BadAtAnswering::preparesWithTheBeamOn, Map.of("P1", "grant", "P15", "sent electrons")),
        bad(BadAtAnswering::echoesWhatItIsAsked, Map.of("P15", "beyond the column's reach")),
        bad(BadAtAnswering::leavesTheBeamOnWhenClosed, Map.of("P16", "the adapter was closed")),
        bad(BadAtAnswering::takesItsProcessForTheSession, Map.of("P17", "a restart changed")),
        bad(BadAtAnswering::doesNotSeeTheDoor, Map.of("P17", "an opened door left the session")),
        bad(BadAtAnswering::leavesTheValveOpen, Map.of("P18", "valveClosed=false")),
        bad(BadAtAnswering::windsDownWithTheBeamOn, Map.of("P18", "beamBlanked=false")));
  }

  private static Arguments bad(
      Function<PlainRig, PlainInstrument> make, Map<String, String> broken) {
    return arguments(make, broken);
  }

  private static void finds(Function<PlainRig, PlainInstrument> bad, Map<String, String> broken) {
    SuiteRun run = SuiteRun.of(folder -> new PlainRig(bad, folder));
    assertEquals(broken.keySet(), run.failed.keySet(), () -> run.failed.toString());
    broken.forEach(
        (promise, why) -> {
          String message = run.failed.get(promise);
          assertTrue(message.contains(promise + ", ") && message.contains(why), message);
        });
    assertEquals(Set.of(), run.notShown.keySet());
    assertEquals(PROMISES, run.passed + broken.size());
  }
}
