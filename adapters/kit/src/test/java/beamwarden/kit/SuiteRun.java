package beamwarden.kit;

import static org.junit.platform.engine.discovery.DiscoverySelectors.selectClass;

import java.nio.file.Path;
import java.util.Map;
import java.util.TreeMap;
import java.util.function.Function;
import org.junit.jupiter.api.io.TempDir;
import org.junit.platform.engine.TestExecutionResult;
import org.junit.platform.launcher.TestExecutionListener;
import org.junit.platform.launcher.TestIdentifier;
import org.junit.platform.launcher.core.LauncherDiscoveryRequestBuilder;
import org.junit.platform.launcher.core.LauncherFactory;

/** What became of each promise when the suite was run from within a test. */
final class SuiteRun implements TestExecutionListener {
  /** By the number of the promise: the message with which its test failed. */
  final Map<String, String> failed = new TreeMap<>();

  /** By the number of the promise: why its test was aborted. */
  final Map<String, String> notShown = new TreeMap<>();

  int passed;

  /** Runs the suite on the calling thread, each test on a new rig. */
  static SuiteRun of(Function<Path, Rig> rigs) {
    return of(rigs, false);
  }

  /** The same, and what cannot be shown counts as a failure. */
  static SuiteRun ofAll(Function<Path, Rig> rigs) {
    return of(rigs, true);
  }

  private static SuiteRun of(Function<Path, Rig> rigs, boolean showsEverything) {
    SuiteRun run = new SuiteRun();
    Suite.rigs = rigs;
    Suite.everything = showsEverything;
    LauncherFactory.create()
        .execute(
            LauncherDiscoveryRequestBuilder.request().selectors(selectClass(Suite.class)).build(),
            run);
    return run;
  }

  @Override
  public void executionFinished(TestIdentifier test, TestExecutionResult result) {
    String message = result.getThrowable().map(Throwable::toString).orElse("");
    if (!test.isTest()) {
      // A container that fails has taken its tests with it: that must not pass for a bad adapter.
      if (result.getStatus() != TestExecutionResult.Status.SUCCESSFUL) {
        failed.put("suite", message);
      }
      return;
    }
    String promise = test.getDisplayName().substring(0, 3).replaceFirst("p0?", "P");
    switch (result.getStatus()) {
      case SUCCESSFUL -> passed++;
      case ABORTED -> notShown.put(promise, message);
      case FAILED -> failed.put(promise, message);
    }
  }

  /** The suite on the rigs of the run that is under way; surefire passes it by. */
  static final class Suite extends AdapterPromises {
    private static Function<Path, Rig> rigs;
    private static boolean everything;
    @TempDir Path folder;

    @Override
    protected Rig rig() {
      return rigs.apply(folder);
    }

    @Override
    protected boolean showsEverything() {
      return everything;
    }
  }
}
