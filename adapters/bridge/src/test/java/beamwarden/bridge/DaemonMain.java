package beamwarden.bridge;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.concurrent.TimeUnit;

/** A process that plays a daemon: connects to a hosted fake, says so, and waits to be killed. */
final class DaemonMain {
  static final String CONNECTED = "connected";

  private DaemonMain() {}

  public static void main(String[] args) throws IOException, InterruptedException {
    Path folder = Path.of(args[0]);
    Events events = new Events();
    BridgeInstrument instrument = new BridgeInstrument(HostProcessIT.fake(folder));
    instrument.connect(events);
    events.next();
    Files.createFile(folder.resolve(CONNECTED));
    TimeUnit.MINUTES.sleep(1);
    instrument.close();
  }
}
