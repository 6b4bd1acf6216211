package beamwarden.command;

import java.util.Map;
import picocli.CommandLine.Command;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;

/** Loosens something, or confirms what only a person can see. */
@Command(
    name = "approve",
    description = {
      "Loosen something, or confirm what only a person can see.",
      "It is an entry in the books, with its reason."
    })
final class ApproveCommand extends RemoteCommand {
  @Parameters(
      paramLabel = "THING",
      description = "A job's id, a sample's id, placements, or hand-over.")
  private String thing;

  @Option(names = "--reason", paramLabel = "TEXT", required = true, description = "Why.")
  private String reason;

  ApproveCommand(Surroundings surroundings) {
    super(surroundings);
  }

  @Override
  ExitCode run(Client client) {
    String answer =
        client.post(
            "/api/v1/approvals", Client.JSON, body(Map.of("thing", thing, "reason", reason)));
    answer(answer, thing + " is approved.\n");
    return ExitCode.FINE;
  }
}
