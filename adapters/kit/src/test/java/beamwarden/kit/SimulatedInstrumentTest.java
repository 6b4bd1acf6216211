package beamwarden.kit;

import beamwarden.instrument.Blanker;
import java.nio.file.Path;
import org.junit.jupiter.api.io.TempDir;

/** The simulated instrument keeps every promise, in this process and on virtual time. */
class SimulatedInstrumentTest extends AdapterPromises {
  @TempDir Path folder;

  @Override
  protected Rig rig() {
    return new SimulatedInMemoryRig(Blanker.Kind.FAST, 7, folder);
  }

  @Override
  protected boolean showsEverything() {
    return true;
  }
}
