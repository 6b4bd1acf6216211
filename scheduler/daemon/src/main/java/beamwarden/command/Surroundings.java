package beamwarden.command;

import java.io.PrintWriter;
import java.util.Map;
import java.util.function.Supplier;

/**
 * What a command finds around it.
 *
 * @param out where its answer goes
 * @param err where messages for people go
 * @param environment the environment's variables
 * @param terminal whether a person watches {@code out} on a terminal
 * @param workshop what is asked for what takes the parts put together; made when it is first needed
 */
record Surroundings(
    PrintWriter out,
    PrintWriter err,
    Map<String, String> environment,
    boolean terminal,
    Supplier<Workshop> workshop) {
  /** The environment variable that names a store when no option does. */
  static final String STORE = "BEAMWARDEN_STORE";

  Surroundings {
    environment = Map.copyOf(environment);
  }

  /** Prints an answer, whose last line is ended already. */
  void answer(String text) {
    out.print(text);
    out.flush();
  }

  /** Prints one line for a person, aside from the answer. */
  void say(String line) {
    err.println(line);
    err.flush();
  }
}
