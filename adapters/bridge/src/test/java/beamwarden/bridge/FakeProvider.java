package beamwarden.bridge;

import beamwarden.instrument.AdapterProvider;
import beamwarden.instrument.Instrument;
import beamwarden.timing.Timeline;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;

/**
 * Offers the fake instrument to a host in a process of its own; it notes there when it is closed.
 */
public final class FakeProvider implements AdapterProvider {
  static final String CLOSED = "closed";

  @Override
  public String name() {
    return "fake";
  }

  @Override
  public Instrument open(Setting setting, Timeline time) {
    if (setting.options().containsKey("broken")) {
      throw new IllegalStateException("the column does not answer");
    }
    // Over streams this must not get between the messages.
    System.out.println("opening the fake instrument at " + time.instant());
    return new FakeInstrument(() -> note(setting.folder().resolve(CLOSED)));
  }

  private static void note(Path file) {
    try {
      Files.createFile(file);
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
  }
}
