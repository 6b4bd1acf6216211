package beamwarden.command;

import java.io.PrintWriter;
import java.io.StringWriter;
import java.util.Arrays;
import java.util.HashMap;
import java.util.Map;
import tools.jackson.databind.JsonNode;
import tools.jackson.databind.json.JsonMapper;

/**
 * What came of a call of the program.
 *
 * @param code its exit code
 * @param out its standard output
 * @param err its standard error
 */
record Called(int code, String out, String err) {
  private static final JsonMapper JSON = new JsonMapper();

  JsonNode json() {
    return JSON.readTree(out);
  }

  /** A caller with a workshop and an environment of its own. */
  static final class Caller {
    final FakeWorkshop workshop = new FakeWorkshop();
    final Map<String, String> environment = new HashMap<>();
    boolean terminal;
    private volatile StringWriter heard = new StringWriter();

    /** Calls the program; paths and numbers are printed as arguments. */
    Called call(Object... arguments) {
      StringWriter out = new StringWriter();
      heard = out;
      StringWriter err = new StringWriter();
      Surroundings surroundings =
          new Surroundings(
              new PrintWriter(out), new PrintWriter(err), environment, terminal, () -> workshop);
      String[] words = Arrays.stream(arguments).map(Object::toString).toArray(String[]::new);
      int code = Commands.run(surroundings, words);
      return new Called(code, out.toString(), err.toString());
    }

    /** Waits until the call under way has answered something that contains a text. */
    void awaitAnswer(String text) {
      while (!heard.toString().contains(text)) {
        Thread.onSpinWait();
      }
    }
  }
}
