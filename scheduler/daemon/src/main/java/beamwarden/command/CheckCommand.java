package beamwarden.command;

import beamwarden.answer.CheckAnswer;
import beamwarden.answer.Json;
import beamwarden.document.Problem;
import beamwarden.ledger.Books;
import beamwarden.plan.Check;
import beamwarden.plan.JobCheck;
import beamwarden.plan.PriorityPlanner;
import beamwarden.profile.Profile;
import beamwarden.queue.Queue;
import beamwarden.report.Pages;
import beamwarden.shift.ShiftCalendar;
import java.nio.file.Path;
import java.time.Instant;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;

/** Says beforehand of a queue what it takes, what it gives, and what does not fit. */
@Command(
    name = "check",
    description = {
      "Check a queue: what each job takes in time and dose, and what does not fit.",
      "Exits with 1 when a job does not fit or a document has errors."
    })
final class CheckCommand implements Callable<Integer> {
  private final Surroundings surroundings;

  @Parameters(paramLabel = "QUEUE", description = "The queue's document, YAML or JSON.")
  private Path queue;

  @Option(
      names = "--instrument",
      paramLabel = "PROFILE",
      required = true,
      description = "The instrument profile's document.")
  private Path profile;

  @Option(
      names = "--store",
      paramLabel = "DIR",
      description = "Count what the samples received in this store, and its jobs.")
  private Path store;

  @Option(
      names = "--from",
      paramLabel = "TIME",
      description = "When it would be handed in; now without it. Without an offset: lab time.")
  private String from;

  @Mixin private CommonOptions common;

  CheckCommand(Surroundings surroundings) {
    this.surroundings = surroundings;
  }

  @Override
  public Integer call() {
    Inputs.Both read = Inputs.read(queue, profile);
    if (!read.usable()) {
      return unusable(read.problems()).code();
    }
    Profile known = read.profile().orElseThrow();
    Queue wanted = read.queue().orElseThrow();
    List<JobCheck> checks = checks(wanted, known);
    CheckAnswer answer = CheckAnswer.of(checks, read.problems(), known.abilities());
    sayProblems(read.problems());
    surroundings.answer(
        common.json()
            ? Json.lines(answer)
            : Pages.check(wanted.name(), known.abilities().instrument(), checks, known.zone()));
    return (answer.ok() ? ExitCode.FINE : ExitCode.NO).code();
  }

  private ExitCode unusable(List<Problem> problems) {
    sayProblems(problems);
    if (common.json()) {
      surroundings.answer(Json.lines(CheckAnswer.unusable(problems)));
    }
    return ExitCode.NO;
  }

  private void sayProblems(List<Problem> problems) {
    problems.forEach(problem -> surroundings.say(problem.text()));
  }

  private List<JobCheck> checks(Queue wanted, Profile known) {
    Optional<Path> folder = Optional.ofNullable(store);
    Books books =
        folder
            .map(path -> Books.of(surroundings.workshop().get().shelf(path).entries()))
            .orElse(Books.EMPTY);
    Instant start =
        from == null ? surroundings.workshop().get().now(folder) : Moments.read(from, known.zone());
    ShiftCalendar calendar = new ShiftCalendar(known.zone(), known.shifts(), known.windDown());
    try {
      return Check.of(wanted, known.abilities(), calendar, new PriorityPlanner(), books, start);
    } catch (IllegalArgumentException refused) {
      throw new CommandFailure(ExitCode.NO, refused.getMessage(), refused);
    }
  }
}
