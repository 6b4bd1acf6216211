package beamwarden.bridge;

import beamwarden.instrument.AdapterProvider;
import beamwarden.instrument.Instrument;
import beamwarden.timing.PacedTime;
import beamwarden.timing.TimeAnchor;
import java.io.IOException;
import java.io.InputStream;
import java.io.OutputStream;
import java.io.PrintStream;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.ServiceConfigurationError;
import java.util.ServiceLoader;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;
import tools.jackson.core.JacksonException;

/** One run of a host, from its command line to its exit code. */
final class HostRun {
  static final int FINE = 0;
  static final int WRONG_USAGE = 2;
  static final int WORLD_FAILED = 3;

  private static final Logger LOGGER = LoggerFactory.getLogger(HostRun.class);

  private final InputStream from;
  private final OutputStream to;
  private final PrintStream complaints;

  HostRun(InputStream from, OutputStream to, PrintStream complaints) {
    this.from = from;
    this.to = to;
    this.complaints = complaints;
  }

  /** Runs, and returns the exit code. */
  int run(List<String> words) {
    try {
      HostArguments arguments = HostArguments.parse(words);
      Address.prepare(arguments.folder());
      return locked(arguments);
    } catch (IllegalArgumentException e) {
      complaints.println("beamwarden host: " + e.getMessage() + "; " + HostArguments.USAGE);
      return WRONG_USAGE;
    } catch (IOException e) {
      complaints.println("beamwarden host: " + e.getMessage());
      return WORLD_FAILED;
    } catch (InterruptedException e) {
      Thread.currentThread().interrupt();
      return WORLD_FAILED;
    } catch (RuntimeException e) {
      LOGGER.error("the adapter could not be hosted", e);
      complaints.println("beamwarden host: the adapter failed: " + e.getMessage());
      return WORLD_FAILED;
    }
  }

  private int locked(HostArguments arguments) throws IOException, InterruptedException {
    if (!FolderLock.keep(arguments.folder())) {
      complaints.println(
          "beamwarden host: another host works in "
              + arguments.folder()
              + "; end that one first, or give this one another folder");
      return WORLD_FAILED;
    }
    hosted(arguments);
    return FINE;
  }

  private void hosted(HostArguments arguments) throws IOException, InterruptedException {
    AdapterProvider provider = provider(arguments.adapter());
    HostSettings settings = settings(arguments.settings());
    AdapterProvider.Setting setting =
        new AdapterProvider.Setting(settings.abilities(), arguments.folder(), settings.options());
    try (PacedTime time = new PacedTime(settings.anchor(), "adapter");
        PacedTime real = new PacedTime(TimeAnchor.real(), "host-watch")) {
      serve(arguments, provider.open(setting, time), time, real);
    }
  }

  private void serve(HostArguments arguments, Instrument instrument, PacedTime time, PacedTime real)
      throws IOException, InterruptedException {
    Optional<HostPort> port = arguments.tcp() ? Optional.of(HostPort.open()) : Optional.empty();
    Host host =
        new Host(
            instrument,
            time,
            real,
            new Host.Settings(port.map(HostPort::token), arguments.idle(), Limits.USUAL));
    Runtime.getRuntime()
        .addShutdownHook(new Thread(() -> end(host, arguments.folder()), "host-shutdown"));
    LOGGER
        .atInfo()
        .addKeyValue("adapter", arguments.adapter())
        .addKeyValue("folder", arguments.folder())
        .log("hosting an adapter");
    if (port.isPresent()) {
      listen(host, port.get(), arguments.folder());
    } else {
      host.serve(new Peer("the daemon", from, to, Optional.empty(), () -> {}));
    }
    host.close();
  }

  private static void listen(Host host, HostPort port, Path folder)
      throws IOException, InterruptedException {
    try (port) {
      port.address().writeTo(folder);
      port.serve(host);
      host.awaitOver();
      end(host, folder);
    }
  }

  private static void end(Host host, Path folder) {
    host.close();
    try {
      Files.deleteIfExists(folder.resolve(Address.FILE));
    } catch (IOException e) {
      LOGGER.atWarn().addKeyValue("reason", e.getMessage()).log("the address file stays behind");
    }
  }

  private static HostSettings settings(Path file) throws IOException {
    byte[] content = Files.readAllBytes(file);
    try {
      return ContractJson.mapper().readValue(content, HostSettings.class);
    } catch (JacksonException e) {
      throw new IllegalArgumentException(file + " holds no settings: " + e.getOriginalMessage(), e);
    }
  }

  private static AdapterProvider provider(String name) {
    try {
      for (AdapterProvider provider : ServiceLoader.load(AdapterProvider.class)) {
        if (provider.name().equals(name)) {
          return provider;
        }
      }
    } catch (ServiceConfigurationError e) {
      throw new IllegalArgumentException("an adapter cannot be loaded: " + e.getMessage(), e);
    }
    throw new IllegalArgumentException("there is no adapter called '" + name + "'");
  }
}
