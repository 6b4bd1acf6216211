package beamwarden.kit;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Path;
import java.util.Map;
import java.util.Set;
import java.util.function.Function;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The suite finds the one promise that an adapter breaks, and nothing else. */
class BadInstrumentsTest {
  private static final int PROMISES = 18;

  @Test
  void findsThatAnAdapterHasNoLease() {
    fails(
        NoLeaseSuite.class,
        Map.of("P7", "without a heartbeat an exposure ended with Optional.empty"));
  }

  @Test
  void findsThatAnAdapterStartsASealedGrantLate() {
    fails(
        SealedGrantLateSuite.class,
        Map.of("P10", "a grant began that must not (a seal forbade it)"));
  }

  @Test
  void findsThatAnAdapterExposesTwice() {
    fails(ExposesTwiceSuite.class, Map.of("P2", "began twice"));
  }

  @Test
  void findsThatAnAdapterSaysNeverBegunForUnknown() {
    // Whether nothing was noted (P3) or the note was passed over (P11) looks alike from outside.
    fails(
        ZeroForUnknownSuite.class,
        Map.of(
            "P3", "an exposure that had begun was said never to have begun",
            "P11", "an exposure that was acknowledged was said never to have begun"));
  }

  @Test
  void findsThatAnAdapterIgnoresTheStop() {
    fails(IgnoresTheStopSuite.class, Map.of("P6", "asked to stop went on to its end"));
  }

  @Test
  void findsThatAReceiptIsSmallerThanWhatWasDelivered() {
    fails(SmallReceiptSuite.class, Map.of("P13", "hides a beam that was on for"));
  }

  private static void fails(Class<? extends AdapterPromises> suite, Map<String, String> broken) {
    SuiteRun run = SuiteRun.of(suite);
    assertEquals(broken.keySet(), run.failed.keySet(), () -> run.failed.toString());
    broken.forEach(
        (promise, why) -> {
          String message = run.failed.get(promise);
          assertTrue(message.contains(promise + ", ") && message.contains(why), message);
        });
    assertEquals(Set.of(), run.notShown.keySet());
    assertEquals(PROMISES, run.passed + broken.size());
  }

  abstract static class Suite extends AdapterPromises {
    private final Function<PlainRig, PlainInstrument> make;
    @TempDir Path folder;

    Suite(Function<PlainRig, PlainInstrument> make) {
      this.make = make;
    }

    @Override
    protected Rig rig() {
      return new PlainRig(make, folder);
    }
  }

  static final class NoLeaseSuite extends Suite {
    NoLeaseSuite() {
      super(BadInstruments.NoLease::new);
    }
  }

  static final class SealedGrantLateSuite extends Suite {
    SealedGrantLateSuite() {
      super(BadInstruments.StartsSealedGrantLate::new);
    }
  }

  static final class ExposesTwiceSuite extends Suite {
    ExposesTwiceSuite() {
      super(BadInstruments.ExposesTwice::new);
    }
  }

  static final class ZeroForUnknownSuite extends Suite {
    ZeroForUnknownSuite() {
      super(BadInstruments.SaysZeroForUnknown::new);
    }
  }

  static final class IgnoresTheStopSuite extends Suite {
    IgnoresTheStopSuite() {
      super(BadInstruments.IgnoresTheStop::new);
    }
  }

  static final class SmallReceiptSuite extends Suite {
    SmallReceiptSuite() {
      super(BadInstruments.SmallReceipt::new);
    }
  }
}
