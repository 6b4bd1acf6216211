package beamwarden.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.time.Instant;
import java.time.ZoneId;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class MomentsTest {
  private static final ZoneId LAB = ZoneId.of("Europe/Ljubljana");

  // The clock goes forward on 2031-03-30 at 02:00 and back on 2031-10-26 at 03:00 (IANA rules).
  @ParameterizedTest
  @CsvSource({
    "2031-03-12T19:00, 2031-03-12T18:00:00Z",
    "2031-03-12T19:00:30, 2031-03-12T18:00:30Z",
    "2031-03-12T19:00Z, 2031-03-12T19:00:00Z",
    "2031-03-12T19:00:00+05:30, 2031-03-12T13:30:00Z",
    "2031-07-12T19:00, 2031-07-12T17:00:00Z",
    "2031-03-30T02:30, 2031-03-30T01:00:00Z",
    "2031-10-26T02:30, 2031-10-26T00:30:00Z"
  })
  void areOfTheLabsClockUnlessTheySayOtherwise(String text, Instant expected) {
    assertEquals(expected, Moments.read(text, LAB));
  }

  @Test
  void thatAreNoneAreRefusedWithAnExample() {
    CommandFailure refused = assertThrows(CommandFailure.class, () -> Moments.read("tonight", LAB));
    assertEquals(ExitCode.USAGE, refused.code());
    assertEquals(
        "tonight is no moment; write 2031-03-12T19:00 by the lab's clock, or with an offset such as"
            + " 2031-03-12T18:00Z",
        refused.getMessage());
  }
}
