package beamwarden.kit;

import beamwarden.instrument.Blanker;
import java.nio.file.Path;
import org.junit.jupiter.api.io.TempDir;

/** The simulated instrument keeps every promise where the beam stays on during flyback. */
class SimulatedSlowBlankerTest extends AdapterPromises {
  @TempDir Path folder;

  @Override
  protected Rig rig() {
    return new SimulatedInMemoryRig(Blanker.Kind.SLOW, 8, folder);
  }

  @Override
  protected boolean showsEverything() {
    return true;
  }
}
