package beamwarden.document;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/**
 * Breaks a whole document in one place and asserts every problem in full: place, message, advice.
 *
 * <p>The cases stand in two resources. {@code ==} begins a case with its claim, {@code -} is a line
 * of the whole document (or a part of one) that the lines with {@code +} take the place of, and
 * {@code !} is a problem to expect.
 */
class BrokenDocumentsTest {

  /**
   * One case.
   *
   * @param claim what it shows
   * @param from the text that is replaced
   * @param to what stands there instead
   * @param problems the problems to expect
   */
  record Case(String claim, String from, String to, List<String> problems) {
    String applied(String whole) {
      assertEquals(whole.indexOf(from), whole.lastIndexOf(from), "several places: " + from);
      assertTrue(whole.contains(from), "no place: " + from);
      return whole.replace(from, to);
    }

    @Override
    public String toString() {
      return claim;
    }
  }

  static Stream<Case> queues() {
    return cases("broken-queues.txt");
  }

  static Stream<Case> profiles() {
    return cases("broken-profiles.txt");
  }

  @ParameterizedTest
  @MethodSource
  void queues(Case broken) {
    assertProblems(broken, Samples.queue(broken.applied(Samples.QUEUE)));
  }

  @ParameterizedTest
  @MethodSource
  void profiles(Case broken) {
    assertProblems(broken, ProfileDocuments.read("profile.yaml", broken.applied(Samples.PROFILE)));
  }

  private static void assertProblems(Case broken, Reading<?> reading) {
    assertEquals(
        String.join("\n", broken.problems()), String.join("\n", Samples.problems(reading)));
    assertTrue(reading.value().isEmpty(), "a document with an error gives no value");
  }

  private static Stream<Case> cases(String resource) {
    List<Case> cases = new ArrayList<>();
    for (String block : Samples.resource(resource).split("(?m)^== ", -1)) {
      if (!block.isBlank()) {
        List<String> lines = block.lines().toList();
        cases.add(
            new Case(
                lines.get(0),
                marked(lines, "-"),
                marked(lines, "+"),
                lines.stream()
                    .filter(line -> line.startsWith("! "))
                    .map(line -> line.substring(2))
                    .toList()));
      }
    }
    assertTrue(cases.size() > 20, "found only " + cases);
    return cases.stream();
  }

  private static String marked(List<String> lines, String mark) {
    return String.join(
        "\n",
        lines.stream()
            .skip(1)
            .filter(line -> line.startsWith(mark + " "))
            .map(line -> line.substring(2))
            .toList());
  }
}
