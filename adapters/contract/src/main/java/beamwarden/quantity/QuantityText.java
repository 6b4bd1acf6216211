package beamwarden.quantity;

import java.math.BigDecimal;
import java.time.Duration;
import java.time.format.DateTimeParseException;
import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * Reads quantities as people write them: a number, a space and a unit.
 *
 * <p>The number is decimal and exact, so that {@code 0.5 nA} and {@code 500 pA} are the same value;
 * only charge per area is rounded, to 34 digits, when it is counted in electrons. The unit comes
 * from a closed table; the caller says which dimension is meant. Ranges are the caller's to check.
 * Where a time is meant, an ISO 8601 duration such as {@code PT90M} is read as well.
 *
 * <p>Every method throws {@link QuantityFormatException} when the text is no such quantity.
 */
public final class QuantityText {
  /** The longest text that is looked at; a longer one is no quantity. */
  public static final int LONGEST_CHARACTERS = 60;

  private static final String BLANK = "[ \u00a0\u2009\u202f]";
  private static final Pattern NUMBER =
      Pattern.compile("[+-]?(?:[0-9]+(?:\\.[0-9]*)?|\\.[0-9]+)(?:[eE][+-]?[0-9]{1,2})?");
  private static final Pattern QUANTITY =
      Pattern.compile("(" + NUMBER.pattern() + ")(" + BLANK + "*)([^0-9 .,][^ ,]*)?");
  private static final Pattern DECIMAL_COMMA = Pattern.compile("[+-]?[0-9]+,[0-9]+( .*)?");
  private static final Pattern ISO_DURATION = Pattern.compile("-?P.*");
  private static final int NANOS_EXPONENT = 9;

  private QuantityText() {}

  /** The value of a text in the unit of {@code dimension}, exact. */
  public static BigDecimal value(String text, Dimension dimension) {
    String trimmed = trimmed(text, dimension);
    if (dimension == Dimension.TIME && ISO_DURATION.matcher(trimmed).matches()) {
      return seconds(isoDuration(trimmed));
    }
    Matcher matcher = QUANTITY.matcher(trimmed);
    if (!matcher.matches()) {
      throw noQuantity(trimmed, dimension);
    }
    String number = matcher.group(1);
    if (matcher.group(3) == null) {
      throw new QuantityFormatException(
          number + " has no unit",
          "write " + dimension.withArticle() + " such as " + dimension.example());
    }
    Unit unit = unit(number, matcher.group(3), dimension);
    if (matcher.group(2).isEmpty() && !unit.symbol().equals("%") && !unit.symbol().equals("°")) {
      throw new QuantityFormatException(
          trimmed + " has no space before its unit", "write " + number + " " + unit.symbol());
    }
    return unit.convert(new BigDecimal(number));
  }

  /** A length. */
  public static Length length(String text) {
    return new Length(value(text, Dimension.LENGTH).doubleValue());
  }

  /** A probe current. */
  public static Current current(String text) {
    return new Current(value(text, Dimension.CURRENT).doubleValue());
  }

  /** An accelerating voltage. */
  public static Voltage voltage(String text) {
    return new Voltage(value(text, Dimension.VOLTAGE).doubleValue());
  }

  /** A charge. */
  public static Charge charge(String text) {
    return new Charge(value(text, Dimension.CHARGE).doubleValue());
  }

  /** A fluence. */
  public static Fluence fluence(String text) {
    return new Fluence(value(text, Dimension.FLUENCE).doubleValue());
  }

  /**
   * A time in whole nanoseconds; one that is finer, or longer than a duration holds, is refused.
   */
  public static Duration duration(String text) {
    BigDecimal nanos = value(text, Dimension.TIME).movePointRight(NANOS_EXPONENT);
    BigDecimal whole = nanos.stripTrailingZeros();
    if (whole.scale() > 0) {
      throw new QuantityFormatException(
          text.strip() + " is no whole number of nanoseconds", "write a time such as 40 us");
    }
    BigDecimal[] parts = nanos.divideAndRemainder(BigDecimal.ONE.movePointRight(NANOS_EXPONENT));
    try {
      return Duration.ofSeconds(parts[0].longValueExact(), parts[1].longValueExact());
    } catch (ArithmeticException tooLong) {
      throw new QuantityFormatException(
          text.strip() + " is longer than any time that can be counted",
          "write a time such as 40 us");
    }
  }

  private static String trimmed(String text, Dimension dimension) {
    String trimmed = text.strip();
    if (trimmed.length() > LONGEST_CHARACTERS) {
      throw noQuantity(trimmed.substring(0, LONGEST_CHARACTERS) + "…", dimension);
    }
    return trimmed;
  }

  private static Unit unit(String number, String written, Dimension dimension) {
    Optional<Unit> found = UnitTable.unit(written);
    if (found.isPresent() && found.get().dimension() == dimension) {
      return found.get();
    }
    String asWritten = number + " " + written;
    String example = "write " + dimension.withArticle() + " such as " + dimension.example();
    if (found.isPresent()) {
      throw new QuantityFormatException(
          asWritten
              + " is "
              + found.get().dimension().withArticle()
              + ", where "
              + dimension.withArticle()
              + " is expected",
          example);
    }
    throw new QuantityFormatException(
        written + " in " + asWritten + " is no unit of " + dimension.noun(),
        UnitTable.inOtherCase(written, dimension)
            .map(meant -> "write " + number + " " + meant.symbol())
            .orElse(example));
  }

  private static QuantityFormatException noQuantity(String text, Dimension dimension) {
    if (DECIMAL_COMMA.matcher(text).matches()) {
      return new QuantityFormatException(
          text + " has a decimal comma", "write " + text.replace(',', '.'));
    }
    return new QuantityFormatException(
        (text.isEmpty() ? "an empty text" : text) + " is no " + dimension.noun(),
        "write a number, a space and a unit, such as " + dimension.example());
  }

  private static Duration isoDuration(String text) {
    try {
      return Duration.parse(text);
    } catch (DateTimeParseException broken) {
      throw new QuantityFormatException(
          text + " is no ISO 8601 duration of days, hours, minutes and seconds",
          "write a time such as PT90M or 90 min");
    }
  }

  private static BigDecimal seconds(Duration duration) {
    return BigDecimal.valueOf(duration.getSeconds())
        .add(BigDecimal.valueOf(duration.getNano(), NANOS_EXPONENT));
  }
}
