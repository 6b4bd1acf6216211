package beamwarden.simulated;

import java.net.URLDecoder;
import java.net.URLEncoder;
import java.nio.charset.StandardCharsets;
import java.util.ArrayDeque;
import java.util.Deque;
import java.util.List;
import java.util.zip.CRC32;

/**
 * A line of a durable note: words between blanks, each percent-encoded, the last one a checksum of
 * what stands before it. Numbers keep every bit.
 */
final class Words {
  private static final String EMPTY = "%";

  private final Deque<String> left;

  private Words(Deque<String> left) {
    this.left = left;
  }

  /** One line, without its line end. */
  static String line(List<?> words) {
    StringBuilder line = new StringBuilder();
    for (Object word : words) {
      line.append(encoded(word.toString())).append(' ');
    }
    return line + checksum(line.toString());
  }

  /**
   * The words of a line.
   *
   * @throws IllegalArgumentException when the line is torn or damaged
   */
  static Words of(String line) {
    int last = line.lastIndexOf(' ') + 1;
    if (last == 0 || !line.substring(last).equals(checksum(line.substring(0, last)))) {
      throw new IllegalArgumentException("the line does not carry its checksum: " + line);
    }
    Deque<String> words = new ArrayDeque<>();
    for (String word : line.substring(0, last - 1).split(" ", -1)) {
      words.add(decoded(word));
    }
    return new Words(words);
  }

  /** The words that a line of them would have, without writing it. */
  static Words written(List<?> words) {
    Deque<String> same = new ArrayDeque<>(words.size());
    for (Object word : words) {
      same.add(word.toString());
    }
    return new Words(same);
  }

  boolean more() {
    return !left.isEmpty();
  }

  String text() {
    return left.remove();
  }

  long whole() {
    return Long.parseLong(text());
  }

  double number() {
    return Double.parseDouble(text());
  }

  boolean yes() {
    return Boolean.parseBoolean(text());
  }

  private static String encoded(String word) {
    return word.isEmpty() ? EMPTY : URLEncoder.encode(word, StandardCharsets.UTF_8);
  }

  private static String decoded(String word) {
    return word.equals(EMPTY) ? "" : URLDecoder.decode(word, StandardCharsets.UTF_8);
  }

  private static String checksum(String text) {
    CRC32 sum = new CRC32();
    sum.update(text.getBytes(StandardCharsets.UTF_8));
    return Long.toHexString(sum.getValue());
  }
}
