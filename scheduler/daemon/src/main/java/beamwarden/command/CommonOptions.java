package beamwarden.command;

import picocli.CommandLine.Option;

/** The options that every command has. */
final class CommonOptions {
  @Option(names = "--json", description = "Answer in JSON.")
  private boolean json;

  @Option(
      names = {"-h", "--help"},
      usageHelp = true,
      description = "Show this help.")
  boolean help;

  boolean json() {
    return json;
  }
}
