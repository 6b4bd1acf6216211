package beamwarden.command;

import java.io.PrintStream;
import java.io.PrintWriter;
import java.nio.charset.StandardCharsets;
import java.util.ServiceLoader;

/** The entry of the program. */
public final class Main {
  /** Set by the launcher: Java cannot tell in every version whether a person watches. */
  private static final String TERMINAL = "BEAMWARDEN_TERMINAL";

  private Main() {}

  /** Runs one command and ends the process with its exit code. */
  public static void main(String[] arguments) {
    Surroundings surroundings =
        new Surroundings(
            writer(System.out),
            writer(System.err),
            System.getenv(),
            System.getenv(TERMINAL) != null,
            Main::workshop);
    System.exit(Commands.run(surroundings, arguments));
  }

  private static Workshop workshop() {
    return ServiceLoader.load(Workshop.class)
        .findFirst()
        .orElseThrow(
            () -> new WorkshopException("the installation is not whole; build it anew: ops/build"));
  }

  private static PrintWriter writer(PrintStream stream) {
    return new PrintWriter(stream, true, StandardCharsets.UTF_8);
  }
}
