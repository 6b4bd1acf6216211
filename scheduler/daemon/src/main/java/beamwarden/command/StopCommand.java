package beamwarden.command;

import java.util.Map;
import picocli.CommandLine.Command;
import picocli.CommandLine.Option;

/** Stops the night. */
@Command(
    name = "stop",
    description = {
      "Stop the night at the next boundary of what is exposing.",
      "release --all lets it go on."
    })
final class StopCommand extends RemoteCommand {
  @Option(names = "--now", description = "Blank the beam at once.")
  private boolean now;

  StopCommand(Surroundings surroundings) {
    super(surroundings);
  }

  @Override
  ExitCode run(Client client) {
    String answer = client.post("/api/v1/night/stop", Client.JSON, body(Map.of("now", now)));
    answer(
        answer,
        now
            ? "The beam is blanked, and the night is stopped; release --all lets it go on.\n"
            : "The night stops at the next boundary; release --all lets it go on.\n");
    return ExitCode.FINE;
  }
}
