package beamwarden.command;

import java.util.List;
import org.slf4j.LoggerFactory;
import picocli.CommandLine;
import picocli.CommandLine.Command;
import picocli.CommandLine.IExecutionExceptionHandler;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.ParameterException;
import picocli.CommandLine.Spec;

/** All commands, what they have in common, and how each ends. */
@Command(
    name = "beamwarden",
    description =
        "Runs a night of cathodoluminescence acquisitions, and never lets a sample receive more"
            + " electrons than its owner allowed.",
    footer = {
      "",
      "Exit codes: 0 fine; 1 the answer is no; 2 wrong usage; 3 the outside world failed.",
      "Commands that speak to a daemon find it by --at, by --store, or by the environment"
          + " variable BEAMWARDEN_STORE."
    },
    synopsisSubcommandLabel = "COMMAND")
final class Commands implements Runnable {
  private static final int WIDTH = 80;

  @Spec private CommandSpec spec;

  @Option(
      names = {"-h", "--help"},
      usageHelp = true,
      description = "Show this help.")
  boolean help;

  private Commands() {}

  /** Runs one command and gives its exit code. */
  static int run(Surroundings surroundings, String... arguments) {
    return line(surroundings).execute(arguments);
  }

  private static CommandLine line(Surroundings surroundings) {
    CommandLine line = new CommandLine(new Commands());
    subcommands(surroundings).forEach(line::addSubcommand);
    line.setOut(surroundings.out())
        .setErr(surroundings.err())
        .setUsageHelpWidth(WIDTH)
        .setColorScheme(CommandLine.Help.defaultColorScheme(CommandLine.Help.Ansi.OFF))
        .setParameterExceptionHandler((wrong, args) -> wrongUsage(surroundings, wrong))
        .setExecutionExceptionHandler(failure(surroundings));
    line.getSubcommands().values().forEach(Commands::headOptions);
    return line;
  }

  private static List<Object> subcommands(Surroundings surroundings) {
    return List.of(
        new CheckCommand(surroundings),
        new RehearseCommand(surroundings),
        new ServeCommand(surroundings),
        new SubmitCommand(surroundings),
        new WatchCommand(surroundings),
        new JobsCommand.Hold(surroundings),
        new JobsCommand.Release(surroundings),
        new JobsCommand.Withdraw(surroundings),
        new StopCommand(surroundings),
        new ApproveCommand(surroundings),
        new DoseCommand(surroundings),
        new ReportCommand(surroundings));
  }

  private static void headOptions(CommandLine subcommand) {
    subcommand.getCommandSpec().usageMessage().sortOptions(false);
  }

  /** Without a command: what there is. */
  @Override
  public void run() {
    throw new ParameterException(spec.commandLine(), "a command is missing");
  }

  private static int wrongUsage(Surroundings surroundings, ParameterException wrong) {
    String command = wrong.getCommandLine().getCommandSpec().qualifiedName();
    surroundings.say("beamwarden: " + wrong.getMessage() + "; try " + command + " --help");
    return ExitCode.USAGE.code();
  }

  private static IExecutionExceptionHandler failure(Surroundings surroundings) {
    return (failure, line, parsed) -> {
      if (failure instanceof CommandFailure known) {
        known.details().forEach(surroundings::say);
        surroundings.say("beamwarden: " + known.getMessage());
        return known.code().code();
      }
      surroundings.say("beamwarden: " + sentence(failure));
      LoggerFactory.getLogger(Commands.class).debug("the command failed", failure);
      return ExitCode.OUTSIDE.code();
    };
  }

  private static String sentence(Exception failure) {
    return failure instanceof WorkshopException
        ? failure.getMessage()
        : "this should not have happened: " + failure;
  }
}
