package beamwarden.document;

import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.api.Assertions.fail;

import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Timeout;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * Damages whole documents at random, many times over: whatever comes of it is a value or a problem,
 * never an exception. A failing round prints its seed; run it alone by putting that into the list.
 */
@Timeout(60)
class MutationTest {
  private static final int ROUNDS = 500;
  private static final List<String> PIECES =
      List.of(
          "",
          " ",
          "\n",
          ":",
          ": ",
          "-",
          "- ",
          "[",
          "]",
          "{",
          "}",
          ",",
          "\"",
          "'",
          "&a ",
          "*a",
          "!",
          "#",
          "|",
          ">",
          "%",
          "@",
          "`",
          "\t",
          "\0",
          "\ud800",
          "\\",
          "\"\\x\"",
          "\"\\U00110000\"",
          "0",
          "-1",
          "1e99 m",
          "1e-99 s",
          "9e99 h",
          "99999999999999999999",
          "NaN",
          ".inf",
          "null",
          "~",
          "true",
          "[]",
          "{}",
          "10 kV",
          "0 um",
          "1e30 m",
          "PT3H",
          "PT-3H",
          "360 deg",
          "1e99 deg",
          "+999999999-12-31T23:59",
          "2031-03-30T02:30",
          "24:00",
          "keep-out: true",
          "? ",
          "<<: *a",
          "...",
          "---\n",
          "\r",
          "\u2028",
          "\ufeff",
          "é");

  @ParameterizedTest
  @ValueSource(longs = {1, 2, 3})
  void neverEndsInAnException(long seed) {
    Random random = new Random(seed);
    for (int round = 0; round < ROUNDS; round++) {
      boolean queue = random.nextBoolean();
      String text = damaged(queue ? Samples.QUEUE : Samples.PROFILE, random);
      try {
        Reading<?> reading = queue ? Samples.queue(text) : ProfileDocuments.read("p.yaml", text);
        assertTrue(
            reading.value().isPresent()
                || reading.problems().stream().anyMatch(MutationTest::forbids),
            "neither a value nor an error");
      } catch (RuntimeException escaped) {
        fail("seed " + seed + ", round " + round + ":\n" + text, escaped);
      }
    }
  }

  private static boolean forbids(Problem problem) {
    return problem.severity() == Problem.Severity.ERROR;
  }

  private static String damaged(String whole, Random random) {
    StringBuilder text = new StringBuilder(whole);
    for (int count = 1 + random.nextInt(4); count > 0; count--) {
      int at = random.nextInt(text.length());
      boolean value = random.nextBoolean();
      int from = value ? valueStart(text, at) : at;
      int length = value ? valueLength(text, from) : random.nextInt(4);
      int to = Math.min(text.length(), from + length);
      text.replace(from, to, PIECES.get(random.nextInt(PIECES.size())));
    }
    return text.toString();
  }

  /** The next place where a value begins. */
  private static int valueStart(CharSequence text, int at) {
    int from = at;
    while (from < text.length() && (from == 0 || text.charAt(from - 1) != ' ')) {
      from++;
    }
    return Math.min(from, text.length() - 1);
  }

  /** To the end of the value or the line. */
  private static int valueLength(CharSequence text, int from) {
    int to = from;
    while (to < text.length() && ",\n}]".indexOf(text.charAt(to)) < 0) {
      to++;
    }
    return to - from;
  }
}
