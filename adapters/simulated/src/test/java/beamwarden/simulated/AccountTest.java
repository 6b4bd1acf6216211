package beamwarden.simulated;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.Placement;
import beamwarden.beam.SpotScan;
import java.time.Duration;
import java.util.List;
import org.junit.jupiter.api.Test;

/** What one scan's beam came to, held against the current moment by moment. */
class AccountTest {
  private static final Duration SCAN = Duration.ofHours(2);
  private static final SpotScan SPOT = new SpotScan(Lab.MIDDLE, SCAN);
  private static final BeamPath PATH = new BeamPath(SPOT, true, Long.MAX_VALUE);
  private static final long NO_SURGE = -1;

  @Test
  void theMonitorShowsWhatFlowedAtTheMostAndAtTheLeast() {
    for (long seed = 0; seed < 200; seed++) {
      TrueCurrent current = current(seed, TrueCurrent.Surge.NONE);
      Outcome outcome = new Account(PATH, current, 0, NO_SURGE, SCAN.toNanos()).outcome(0);
      for (double second = 0; second <= SCAN.toSeconds(); second += 7) {
        double flows = current.amperes(second);
        assertTrue(flows <= outcome.highest().amperes(), "seed " + seed);
        assertTrue(flows >= outcome.lowest().amperes(), "seed " + seed);
      }
    }
  }

  @Test
  void eachPartIsWithinOnePercentOfItsMean() {
    for (long seed = 0; seed < 200; seed++) {
      TrueCurrent current = current(seed, TrueCurrent.Surge.NONE);
      List<Stretch> parts = stretches(new Account(PATH, current, 0, NO_SURGE, SCAN.toNanos()));
      assertEquals(12, parts.size());
      for (int second = 0; second < SCAN.toSeconds(); second += 7) {
        double mean = parts.get(second / 600).currentAmperes();
        assertEquals(1, current.amperes(second) / mean, 0.01, "seed " + seed);
      }
    }
  }

  @Test
  void aSurgeBeginsAPartOfItsOwn() {
    TrueCurrent current = current(3, new TrueCurrent.Surge(100, 2));
    List<Stretch> parts =
        stretches(
            new Account(
                PATH,
                current,
                0,
                Duration.ofSeconds(100).toNanos(),
                Duration.ofSeconds(300).toNanos()));
    assertEquals(2, parts.size());
    assertEquals(Session.EVENING.plusSeconds(100), parts.get(1).began());
    assertEquals(2, parts.get(1).currentAmperes() / parts.get(0).currentAmperes(), 0.01);
  }

  private static List<Stretch> stretches(Account account) {
    Run run =
        new Run(
            1, 1, "abs-3", new Placement(Lab.MIDDLE, 0, 0), SPOT, Long.MAX_VALUE, Session.EVENING);
    return account.stretches(new TrueScan(run, PATH, Lab.MIDDLE, 1, 1, 6e-9));
  }

  private static TrueCurrent current(long seed, TrueCurrent.Surge surge) {
    return new Imperfection(Lab.abilities(), Simulation.inMemory(seed))
        .current(Lab.GENTLE.current(), 1, surge);
  }
}
