package beamwarden.document;

import java.math.BigDecimal;
import java.math.MathContext;
import java.time.Duration;
import java.util.List;

/** Words and numbers as problems print them. */
final class Printed {
  private static final MathContext FOUR_DIGITS = new MathContext(4);
  private static final List<String> UNITS = List.of("h", "min", "s", "ms", "us");
  private static final List<Duration> SIZES =
      List.of(
          Duration.ofHours(1),
          Duration.ofMinutes(1),
          Duration.ofSeconds(1),
          Duration.ofMillis(1),
          Duration.ofNanos(1000));

  private Printed() {}

  /** A quantity with its unit. */
  static String value(Object quantity) {
    return quantity instanceof Duration time ? time(time) : quantity.toString();
  }

  /** A time in the largest unit of which it has at least one. */
  static String time(Duration time) {
    for (int index = 0; index < UNITS.size(); index++) {
      if (time.abs().compareTo(SIZES.get(index)) >= 0) {
        BigDecimal number = nanos(time).divide(nanos(SIZES.get(index)), FOUR_DIGITS);
        return number.stripTrailingZeros().toPlainString() + " " + UNITS.get(index);
      }
    }
    return time.toNanos() + " ns";
  }

  /** A foreign text without what would break a line. */
  static String line(String text) {
    return text.replaceAll("[\\p{Cntrl}\\p{Cs}\\u2028\\u2029]", "?").strip();
  }

  /** The beginning of a foreign text without what would break a line. */
  static String quoted(String text) {
    String line = line(text);
    return line.length() > Limits.QUOTED_CHARACTERS
        ? line.substring(0, line.offsetByCodePoints(0, safe(line))) + "…"
        : line;
  }

  /** Names in a row, the last one joined by {@code or}. */
  static String anyOf(Iterable<String> names) {
    String row = String.join(", ", names);
    int last = row.lastIndexOf(", ");
    return last < 0 ? row : row.substring(0, last) + " or " + row.substring(last + 2);
  }

  private static int safe(String line) {
    return Math.min(Limits.QUOTED_CHARACTERS, line.codePointCount(0, line.length()));
  }

  private static BigDecimal nanos(Duration time) {
    return BigDecimal.valueOf(time.getSeconds())
        .movePointRight(9)
        .add(BigDecimal.valueOf(time.getNano()));
  }
}
