package beamwarden.kit;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Path;
import java.util.Map;
import java.util.Set;
import org.junit.jupiter.api.Test;

/** What a rig cannot show is never reported as passed. */
class NotShownTest {
  private static final int PROMISES = 18;

  @Test
  void namesEachPromiseThatTheRigCannotShow() {
    SuiteRun run = SuiteRun.of(NotShownTest::unprovoked);
    assertEquals(Map.of(), run.failed);
    assertEquals(Set.of("P1", "P4", "P5", "P7", "P13", "P15", "P17"), run.notShown.keySet());
    assertEquals(PROMISES, run.passed + run.notShown.size());
  }

  @Test
  void saysWhyAPromiseIsNotShown() {
    Map<String, String> notShown = SuiteRun.of(NotShownTest::unprovoked).notShown;
    ends(
        notShown.get("P4"),
        "P4, the grant's time, is not shown: there is no independent record of what was delivered");
    ends(
        notShown.get("P5"),
        "P5, the grant's current, is not shown: too high a current cannot be provoked: the lab"
            + " forbids it");
  }

  @Test
  void failsWhatIsNotShownWhenEverythingMustBe() {
    SuiteRun run = SuiteRun.ofAll(NotShownTest::unprovoked);
    assertEquals(Map.of(), run.notShown);
    assertEquals(Set.of("P1", "P4", "P5", "P7", "P13", "P15", "P17"), run.failed.keySet());
  }

  private static Rig unprovoked(Path folder) {
    return new UnprovokedRig(new PlainRig(PlainInstrument::new, folder));
  }

  private static void ends(String message, String end) {
    assertTrue(message.endsWith(end), message);
  }
}
