package beamwarden.command;

import java.nio.file.Path;
import java.util.Optional;

/** A command that reads from a daemon, or from a store in which none is at work. */
abstract class ReadingCommand extends RemoteCommand {
  ReadingCommand(Surroundings surroundings) {
    super(surroundings);
  }

  /** Answers from a store's own entries. */
  abstract void fromStore(Workshop.Shelf shelf);

  /** The path at which a daemon answers the same. */
  abstract String path();

  @Override
  final ExitCode run() {
    Optional<Path> folder =
        daemon().byAddress() ? Optional.empty() : daemon().store(surroundings());
    if (folder.isPresent() && !served(folder.get())) {
      fromStore(surroundings().workshop().get().shelf(folder.get()));
      return ExitCode.FINE;
    }
    return run(client());
  }

  /** A daemon that was killed leaves its address behind, and another one may have taken it. */
  private boolean served(Path folder) {
    return DaemonOptions.served(folder)
        .filter(address -> new Client(address, Optional.of(folder)).serves(folder))
        .isPresent();
  }

  @Override
  final ExitCode run(Client client) {
    String answer = client.get(path(), json() ? Client.JSON : Client.TEXT);
    surroundings().answer(json() ? indented(answer) : answer);
    return ExitCode.FINE;
  }
}
