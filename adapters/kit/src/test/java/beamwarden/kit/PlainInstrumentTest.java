package beamwarden.kit;

import java.nio.file.Path;
import org.junit.jupiter.api.io.TempDir;

/** The smallest honest adapter keeps every promise. */
class PlainInstrumentTest extends AdapterPromises {
  @TempDir Path folder;

  @Override
  protected Rig rig() {
    return new PlainRig(PlainInstrument::new, folder);
  }

  @Override
  protected boolean showsEverything() {
    return true;
  }
}
