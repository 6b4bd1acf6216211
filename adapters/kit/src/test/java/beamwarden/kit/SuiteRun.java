package beamwarden.kit;

import static org.junit.platform.engine.discovery.DiscoverySelectors.selectClass;

import java.util.Map;
import java.util.TreeMap;
import org.junit.platform.engine.TestExecutionResult;
import org.junit.platform.launcher.Launcher;
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

  static SuiteRun of(Class<? extends AdapterPromises> suite) {
    SuiteRun run = new SuiteRun();
    Launcher launcher = LauncherFactory.create();
    launcher.execute(
        LauncherDiscoveryRequestBuilder.request().selectors(selectClass(suite)).build(), run);
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
}
