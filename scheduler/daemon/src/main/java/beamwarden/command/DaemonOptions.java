package beamwarden.command;

import java.io.IOException;
import java.net.URI;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Optional;
import picocli.CommandLine.Option;

/** Where the daemon is that a command speaks to. */
final class DaemonOptions {
  @Option(
      names = "--at",
      paramLabel = "URL",
      description = "The daemon's address, such as http://127.0.0.1:8080.")
  private String at;

  @Option(
      names = "--store",
      paramLabel = "DIR",
      description = "The daemon's store, in which its address and its token lie.")
  private Path store;

  /** The store that was named, by the option or the environment. */
  Optional<Path> store(Surroundings surroundings) {
    return Optional.ofNullable(store)
        .or(
            () ->
                Optional.ofNullable(surroundings.environment().get(Surroundings.STORE))
                    .filter(name -> !name.isBlank())
                    .map(Path::of));
  }

  /** Whether an address was given. */
  boolean byAddress() {
    return at != null;
  }

  /** The daemon's address as it is now: a daemon that starts again may have another one. */
  URI address(Surroundings surroundings) {
    if (at != null) {
      return parse(at);
    }
    Path folder =
        store(surroundings)
            .orElseThrow(
                () ->
                    new CommandFailure(
                        ExitCode.USAGE,
                        "say where the daemon is, with --at URL, --store DIR or the environment"
                            + " variable "
                            + Surroundings.STORE));
    return served(folder)
        .orElseThrow(
            () ->
                new CommandFailure(
                    ExitCode.OUTSIDE,
                    "no daemon serves the store "
                        + folder
                        + "; start one with beamwarden serve --store "
                        + folder));
  }

  /** The address in a store's folder, when a daemon has written one. */
  static Optional<URI> served(Path folder) {
    Path file = folder.resolve("address");
    if (!Files.exists(file)) {
      return Optional.empty();
    }
    try {
      return Optional.of(parse(Files.readString(file).strip()));
    } catch (IOException unreadable) {
      throw new CommandFailure(
          ExitCode.OUTSIDE, file + " cannot be read: " + unreadable.getMessage(), unreadable);
    }
  }

  private static URI parse(String text) {
    try {
      URI address = URI.create(text);
      if ("http".equals(address.getScheme()) && address.getHost() != null) {
        return address;
      }
    } catch (IllegalArgumentException malformed) {
      throw new CommandFailure(ExitCode.USAGE, wrong(text), malformed);
    }
    throw new CommandFailure(ExitCode.USAGE, wrong(text));
  }

  private static String wrong(String text) {
    return text + " is no address of a daemon; write http://127.0.0.1:8080";
  }
}
