package beamwarden.command;

import beamwarden.answer.ProblemAnswer;
import beamwarden.answer.SubmittedAnswer;
import java.nio.file.Path;
import java.util.Locale;
import java.util.Optional;
import picocli.CommandLine.Command;
import picocli.CommandLine.Parameters;

/** Hands a queue in. */
@Command(name = "submit", description = "Hand a queue in to a running daemon.")
final class SubmitCommand extends RemoteCommand {
  @Parameters(paramLabel = "QUEUE", description = "The queue's document, YAML or JSON.")
  private Path queue;

  SubmitCommand(Surroundings surroundings) {
    super(surroundings);
  }

  @Override
  ExitCode run(Client client) {
    String text = Inputs.text(queue);
    String name = Optional.ofNullable(queue.getFileName()).orElse(queue).toString();
    boolean json = name.toLowerCase(Locale.ROOT).endsWith(".json");
    String answer =
        client.post(
            "/api/v1/queues?name=" + encoded(name), json ? Client.JSON : "application/yaml", text);
    SubmittedAnswer submitted = client.read(answer, SubmittedAnswer.class);
    submitted.problems().stream().map(ProblemAnswer::text).forEach(surroundings()::say);
    answer(
        answer, submitted.queue() + " was taken in: " + String.join(", ", submitted.jobs()) + "\n");
    return ExitCode.FINE;
  }
}
