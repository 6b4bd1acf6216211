package beamwarden.bridge;

import beamwarden.instrument.Abilities;
import beamwarden.timing.TimeAnchor;
import java.io.File;
import java.io.IOException;
import java.net.InetAddress;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/**
 * An adapter in a process of its own on this machine, which goes on when this process ends.
 *
 * <p>The process is found through the file {@code address} of its folder, and started when the
 * folder's lock says that there is none. It is cut loose from this one: no pipe, no terminal, a
 * session of its own where the system offers {@code setsid}. A host of this program that runs with
 * other settings than wanted is ended in order, and another one started.
 */
public final class HostProcess implements PeerStarter {
  private static final Logger LOGGER = LoggerFactory.getLogger(HostProcess.class);
  private static final String LOG = "host.log";
  private static final String SETTINGS = "settings.json";
  private static final List<String> SMALL_JVM =
      List.of("-Xmx192m", "-XX:+UseSerialGC", "-XX:TieredStopAtLevel=1", "-Xshare:auto");
  private static final long LONGEST_LOG_READ_BYTES = 1 << 20;
  private static final int MOST_TRIES = 400;
  private static final long MILLIS_BETWEEN = 50;

  private final Path folder;
  private final List<String> command;
  private final Optional<HostSettings> settings;

  /**
   * An adapter in any language.
   *
   * @param folder its folder, where it keeps {@code address} and {@code lock}
   * @param command what starts it
   */
  public HostProcess(Path folder, List<String> command) {
    this(folder, command, Optional.empty());
  }

  private HostProcess(Path folder, List<String> command, Optional<HostSettings> settings) {
    this.folder = folder;
    this.command = List.copyOf(command);
    this.settings = settings;
  }

  /**
   * An adapter of this program's own class path, in a {@link HostMain}.
   *
   * @param adapter the name of its provider
   * @param folder its folder
   * @param abilities what the profile says of the instrument
   * @param options anything else, by name
   * @param anchor the line of time on which it lives
   */
  public static HostProcess ofAdapter(
      String adapter,
      Path folder,
      Abilities abilities,
      Map<String, String> options,
      TimeAnchor anchor) {
    Path home = folder.toAbsolutePath();
    HostArguments arguments =
        new HostArguments(adapter, home, home.resolve(SETTINGS), HostArguments.USUAL_IDLE, true);
    return new HostProcess(
        home, java(arguments), Optional.of(new HostSettings(abilities, options, anchor)));
  }

  static List<String> java(HostArguments arguments) {
    List<String> command = new ArrayList<>();
    command.add(Path.of(System.getProperty("java.home"), "bin", "java").toString());
    command.addAll(SMALL_JVM);
    command.add("-cp");
    command.add(System.getProperty("java.class.path"));
    command.add(HostMain.class.getName());
    command.addAll(arguments.toList());
    return command;
  }

  @Override
  public Peer open() throws IOException {
    Address.prepare(folder);
    endThatOfOtherSettings();
    Optional<Process> started = Optional.empty();
    Optional<Address> left = Optional.empty();
    if (!FolderLock.held(folder)) {
      left = Address.in(folder);
      started = Optional.of(start());
    }
    return await(started, left);
  }

  /** A changed profile needs another host; the old one blanks the beam as it ends. */
  private void endThatOfOtherSettings() throws IOException {
    Path file = folder.resolve(SETTINGS);
    if (settings.isEmpty() || !FolderLock.held(folder) || Files.notExists(file)) {
      return;
    }
    if (Arrays.equals(wanted(), Files.readAllBytes(file))) {
      return;
    }
    LOGGER.atInfo().addKeyValue("folder", folder).log("ending a host of other settings");
    Address.in(folder)
        .flatMap(address -> ProcessHandle.of(address.pid()))
        .ifPresent(ProcessHandle::destroy);
    for (int tries = 0; tries < MOST_TRIES && FolderLock.held(folder); tries++) {
      pause();
    }
    if (FolderLock.held(folder)) {
      throw new IOException(
          "the adapter in " + folder + " has other settings and does not end; end it first");
    }
  }

  private byte[] wanted() {
    return ContractJson.mapper().writeValueAsBytes(settings.orElseThrow());
  }

  private Process start() throws IOException {
    if (settings.isPresent()) {
      Address.write(folder.resolve(SETTINGS), wanted());
    }
    List<String> detached = new ArrayList<>();
    setsid().ifPresent(detached::add);
    detached.addAll(command);
    return new ProcessBuilder(detached)
        .redirectInput(new File("/dev/null"))
        .redirectErrorStream(true)
        .redirectOutput(ProcessBuilder.Redirect.appendTo(folder.resolve(LOG).toFile()))
        .start();
  }

  private static Optional<String> setsid() {
    String path = Optional.ofNullable(System.getenv("PATH")).orElse("");
    return Arrays.stream(path.split(File.pathSeparator))
        .map(place -> Path.of(place, "setsid"))
        .filter(Files::isExecutable)
        .map(Path::toString)
        .findFirst();
  }

  /** Connects as soon as there is an address, other than the one an earlier process has left. */
  private Peer await(Optional<Process> started, Optional<Address> left) throws IOException {
    String failure = "it has written no address";
    for (int tries = 0; tries < MOST_TRIES; tries++) {
      Optional<Address> address = Address.in(folder);
      if (address.isPresent() && !address.equals(left)) {
        try {
          return connected(address.get());
        } catch (IOException e) {
          failure = e.getMessage();
        }
      }
      if (started.isPresent() && !started.get().isAlive()) {
        failure = "its process ended with code " + started.get().exitValue() + lastLine();
        break;
      }
      pause();
    }
    throw new IOException("no adapter in " + folder + ": " + failure + "; see its " + LOG);
  }

  /** What the process said last, for people who should not have to look for it. */
  private String lastLine() throws IOException {
    Path log = folder.resolve(LOG);
    if (Files.size(log) == 0 || Files.size(log) > LONGEST_LOG_READ_BYTES) {
      return "";
    }
    List<String> lines = Files.readAllLines(log, StandardCharsets.ISO_8859_1);
    return " (" + Messages.shortened(lines.get(lines.size() - 1)) + ")";
  }

  private static Peer connected(Address address) throws IOException {
    InetAddress host = InetAddress.getByName(address.host());
    if (!host.isLoopbackAddress()) {
      throw new IOException("its address " + address.host() + " is not this machine");
    }
    return Peer.at(host, address.port(), Optional.of(address.token()));
  }

  private static void pause() throws IOException {
    try {
      Thread.sleep(MILLIS_BETWEEN);
    } catch (InterruptedException e) {
      Thread.currentThread().interrupt();
      throw new IOException("interrupted while an adapter was starting", e);
    }
  }
}
