package beamwarden.kit;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.timing.PacedTime;
import beamwarden.timing.TimeAnchor;
import beamwarden.timing.VirtualTime;
import java.time.Duration;
import java.time.Instant;
import java.util.concurrent.atomic.AtomicBoolean;
import org.junit.jupiter.api.Test;

class PassageTest {
  private static final Instant ORIGIN = Instant.parse("2031-03-12T19:00:00Z");

  private final AtomicBoolean happened = new AtomicBoolean();

  @Test
  void standsStillWhereVirtualTimeMadeItSo() {
    VirtualTime line = new VirtualTime(ORIGIN);
    line.after(Duration.ofSeconds(2), () -> happened.set(true));
    line.after(Duration.ofSeconds(3), () -> happened.set(false));
    assertTrue(Passage.of(line).until(happened::get, Duration.ofSeconds(5)));
    assertEquals(ORIGIN.plusSeconds(2), line.instant());
  }

  @Test
  void movesVirtualTimeNoFurtherThanItMay() {
    VirtualTime line = new VirtualTime(ORIGIN);
    line.after(Duration.ofSeconds(9), () -> happened.set(true));
    Passage passage = Passage.of(line);
    assertFalse(passage.until(happened::get, Duration.ofSeconds(5)));
    assertEquals(ORIGIN.plusSeconds(5), passage.now());
  }

  @Test
  void leavesNothingWaitingOnTheLine() {
    VirtualTime line = new VirtualTime(ORIGIN);
    Passage.of(line).until(() -> true, Duration.ofSeconds(5));
    assertFalse(line.runNext());
  }

  @Test
  void waitsForPacedTime() {
    // A second of the line takes a millisecond.
    TimeAnchor anchor = new TimeAnchor(ORIGIN, Instant.EPOCH, 1000);
    try (PacedTime line = new PacedTime(anchor, "passage-test")) {
      Passage passage = Passage.of(line);
      line.after(Duration.ofSeconds(5), () -> happened.set(true));
      assertTrue(passage.until(happened::get, Duration.ofHours(1)));
      assertFalse(passage.until(() -> false, Duration.ofSeconds(5)));
    }
  }
}
