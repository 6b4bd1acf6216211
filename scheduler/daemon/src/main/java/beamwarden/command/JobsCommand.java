package beamwarden.command;

import beamwarden.answer.JobsAnswer;
import beamwarden.answer.ProgressAnswer;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.ParameterException;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** A change of some jobs, or of all. */
abstract class JobsCommand extends RemoteCommand {
  private final String verb;

  @Spec private CommandSpec spec;

  @Parameters(paramLabel = "JOB", arity = "0..*", description = "The jobs' ids.")
  private List<String> jobs = new ArrayList<>();

  @Option(names = "--all", description = "All jobs that this could be done to.")
  private boolean all;

  JobsCommand(Surroundings surroundings, String verb) {
    super(surroundings);
    this.verb = verb;
  }

  /** Holds jobs. */
  @Command(name = "hold", description = "Hold jobs; a running one ends at its next boundary.")
  static final class Hold extends JobsCommand {
    Hold(Surroundings surroundings) {
      super(surroundings, "hold");
    }
  }

  /** Lets held jobs go on. */
  @Command(
      name = "release",
      description = {
        "Let held jobs go on; with --all a stopped night too.",
        "A job that waits for an approval needs approve."
      })
  static final class Release extends JobsCommand {
    Release(Surroundings surroundings) {
      super(surroundings, "release");
    }

    @Override
    String besides() {
      return "The night goes on if it was stopped.\n";
    }
  }

  /** Takes jobs back. */
  @Command(name = "withdraw", description = "Take jobs back, for good.")
  static final class Withdraw extends JobsCommand {
    Withdraw(Surroundings surroundings) {
      super(surroundings, "withdraw");
    }
  }

  @Override
  final ExitCode run(Client client) {
    if (all != jobs.isEmpty()) {
      throw new ParameterException(spec.commandLine(), "name jobs, or all of them with --all");
    }
    Map<String, ?> which = all ? Map.of("all", true) : Map.of("jobs", jobs);
    String answer = client.post("/api/v1/jobs/" + verb, Client.JSON, body(which));
    answer(answer, page(client.read(answer, JobsAnswer.class)));
    return ExitCode.FINE;
  }

  private String page(JobsAnswer answer) {
    StringBuilder page = new StringBuilder();
    for (ProgressAnswer job : answer.jobs()) {
      page.append(job.id()).append(" is ").append(job.state()).append('\n');
    }
    if (answer.jobs().isEmpty()) {
      page.append("There is no job to ").append(verb).append(".\n");
    }
    return page.append(all ? besides() : "").toString();
  }

  /** What happens with all of them besides. */
  String besides() {
    return "";
  }
}
