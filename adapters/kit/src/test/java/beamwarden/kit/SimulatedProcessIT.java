package beamwarden.kit;

import java.nio.file.Path;
import java.time.InstantSource;
import org.junit.jupiter.api.io.TempDir;

/** The simulated instrument keeps every promise as a process of its own, behind the bridge. */
class SimulatedProcessIT extends AdapterPromises {
  @TempDir Path folder;

  @Override
  protected Rig rig() {
    return new SimulatedProcessRig(folder, InstantSource.system().instant());
  }

  @Override
  protected boolean showsEverything() {
    return true;
  }
}
