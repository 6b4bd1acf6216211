package beamwarden.document;

import beamwarden.beam.Point;
import beamwarden.quantity.Charge;
import beamwarden.quantity.Current;
import beamwarden.quantity.Dimension;
import beamwarden.quantity.Fluence;
import beamwarden.quantity.Length;
import beamwarden.quantity.QuantityFormatException;
import beamwarden.quantity.QuantityText;
import beamwarden.quantity.Voltage;
import java.math.BigDecimal;
import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.Function;
import java.util.regex.Pattern;

/** Reads single values from nodes; what cannot be read is told, and gives nothing. */
final class Values {
  private static final Pattern ID =
      Pattern.compile("[A-Za-z0-9][A-Za-z0-9._-]{0," + (Limits.ID_CHARACTERS - 1) + "}");
  private static final Pattern WHOLE = Pattern.compile("-?[0-9]{1,18}");

  private final Problems problems;

  Values(Problems problems) {
    this.problems = problems;
  }

  /** Which numbers are allowed. */
  enum Sign {
    ANY,
    NOT_NEGATIVE,
    POSITIVE
  }

  /**
   * Two numbers, the lower one first.
   *
   * @param low the lower one
   * @param high the higher one, or the same
   */
  record Range(BigDecimal low, BigDecimal high) {}

  /** One value as text. */
  Optional<Node.Scalar> scalar(Node node, String example) {
    if (node instanceof Node.Scalar scalar && !scalar.empty()) {
      return Optional.of(scalar);
    }
    String kind = node instanceof Node.Scalar ? "empty" : node.kind();
    problems.error(
        node,
        node.name() + " is " + kind + ", where one value is expected",
        "write for example " + example);
    return Optional.empty();
  }

  Optional<Node.Sequence> list(Node node, String example) {
    if (node instanceof Node.Sequence list) {
      return Optional.of(list);
    }
    problems.error(
        node,
        node.name() + " is " + node.kind() + ", where a list is expected",
        "write for example " + node.name() + ": " + example);
    return Optional.empty();
  }

  Optional<Node.Mapping> group(Node node, String example) {
    if (node instanceof Node.Mapping group) {
      return Optional.of(group);
    }
    problems.error(
        node,
        node.name() + " is " + node.kind() + ", where a group of keys is expected",
        "write for example " + example);
    return Optional.empty();
  }

  /** The values of a group whose keys are checked. */
  Optional<Fields> fields(Node node, String example, Keys keys) {
    return group(node, example)
        .map(
            group -> {
              keys.check(group, problems);
              return new Fields(group, Optional.empty(), keys.of(), problems);
            });
  }

  /** A text of the allowed length. */
  Optional<String> text(Node node, String example) {
    return scalar(node, example)
        .map(Node.Scalar::text)
        .filter(
            text -> {
              if (text.length() <= Limits.TEXT_CHARACTERS) {
                return true;
              }
              problems.error(
                  node,
                  node.name() + " has " + text.length() + " characters",
                  "write at most " + Limits.TEXT_CHARACTERS);
              return false;
            });
  }

  /** A name that may end in a path or an address. */
  Optional<String> id(Node node, String example) {
    return scalar(node, example).flatMap(scalar -> checkedId(scalar, scalar.text(), example));
  }

  /** The same for a name that stands as a key. */
  Optional<String> id(Node.Scalar key) {
    return checkedId(key, key.text(), "grain-2");
  }

  private Optional<String> checkedId(Node node, String text, String example) {
    if (ID.matcher(text).matches()) {
      return Optional.of(text);
    }
    problems.error(
        node,
        "\"" + Printed.quoted(text) + "\" is no name that can stand in a path or an address",
        "write at most "
            + Limits.ID_CHARACTERS
            + " of a-z A-Z 0-9 - _ . that begin with a letter or digit, such as "
            + example);
    return Optional.empty();
  }

  Optional<Boolean> flag(Node node) {
    return choice(node, Map.of("true", true, "false", false), List.of("true", "false"));
  }

  /** One of some names. */
  <T> Optional<T> choice(Node node, Map<String, T> meanings, List<String> inOrder) {
    return scalar(node, inOrder.get(0))
        .flatMap(
            scalar -> {
              Optional<T> meant = Optional.ofNullable(meanings.get(scalar.text()));
              if (meant.isEmpty()) {
                String written = Printed.quoted(scalar.text());
                problems.error(
                    node,
                    node.name() + " cannot be " + written,
                    Near.to(scalar.text(), inOrder)
                        .map(near -> "did you mean " + near + "?")
                        .orElse("write " + Printed.anyOf(inOrder)));
              }
              return meant;
            });
  }

  /** A whole number from {@code low} to {@code high}. */
  Optional<Long> whole(Node node, long low, long high) {
    return scalar(node, Long.toString(low))
        .flatMap(
            scalar -> {
              if (WHOLE.matcher(scalar.text()).matches()) {
                long number = Long.parseLong(scalar.text());
                if (number >= low && number <= high) {
                  return Optional.of(number);
                }
              }
              problems.error(
                  node,
                  node.name()
                      + " is "
                      + Printed.quoted(scalar.text())
                      + ", which is no whole number from "
                      + low
                      + " to "
                      + high,
                  "write for example " + Math.max(low, Math.min(5, high)));
              return Optional.empty();
            });
  }

  Optional<Voltage> voltage(Node node) {
    return quantity(node, Dimension.VOLTAGE, Sign.POSITIVE).map(v -> new Voltage(v.doubleValue()));
  }

  Optional<Current> current(Node node, Sign sign) {
    return quantity(node, Dimension.CURRENT, sign).map(v -> new Current(v.doubleValue()));
  }

  Optional<Charge> charge(Node node) {
    return quantity(node, Dimension.CHARGE, Sign.NOT_NEGATIVE)
        .map(v -> new Charge(v.doubleValue()));
  }

  Optional<Fluence> fluence(Node node) {
    return quantity(node, Dimension.FLUENCE, Sign.NOT_NEGATIVE)
        .map(v -> new Fluence(v.doubleValue()));
  }

  Optional<Length> length(Node node, Sign sign) {
    return quantity(node, Dimension.LENGTH, sign).map(v -> new Length(v.doubleValue()));
  }

  Optional<Double> number(Node node, Dimension dimension, Sign sign) {
    return quantity(node, dimension, sign).map(BigDecimal::doubleValue);
  }

  /** A part of a whole, from 0 to {@code most}. */
  Optional<Double> part(Node node, String most) {
    BigDecimal limit = QuantityText.value(most, Dimension.RATIO);
    return quantity(node, Dimension.RATIO, Sign.NOT_NEGATIVE)
        .filter(value -> atMost(node, value, limit, most))
        .map(BigDecimal::doubleValue);
  }

  private boolean atMost(Node node, BigDecimal value, BigDecimal limit, String most) {
    if (value.compareTo(limit) <= 0) {
      return true;
    }
    problems.error(
        node,
        node.name() + " is " + written(node) + ", more than " + most,
        "write at most " + most);
    return false;
  }

  /** A time of whole nanoseconds within a year. */
  Optional<Duration> time(Node node, Sign sign) {
    return parsed(node, Dimension.TIME.example(), QuantityText::duration)
        .filter(time -> signed(node, Long.signum(time.compareTo(Duration.ZERO)), sign))
        .filter(
            time -> {
              boolean fits = time.compareTo(Limits.TIME) <= 0;
              if (!fits) {
                problems.error(
                    node,
                    node.name() + " is " + written(node) + ", more than a year",
                    "write a shorter time");
              }
              return fits;
            });
  }

  /** The value of a quantity in the unit of its dimension. */
  Optional<BigDecimal> quantity(Node node, Dimension dimension, Sign sign) {
    return parsed(node, dimension.example(), text -> QuantityText.value(text, dimension))
        .filter(value -> signed(node, value.signum(), sign));
  }

  /** Two quantities in brackets, the lower one first. */
  Optional<Range> range(Node node, Dimension dimension, Sign sign, String example) {
    return pair(node, example)
        .flatMap(
            pair -> {
              Optional<BigDecimal> low = quantity(pair.get(0), dimension, sign);
              Optional<BigDecimal> high = quantity(pair.get(1), dimension, sign);
              if (low.isEmpty() || high.isEmpty()) {
                return Optional.empty();
              }
              if (low.get().compareTo(high.get()) > 0) {
                problems.error(
                    node,
                    node.name() + " has its higher end first",
                    "write the lower end first, such as " + example);
                return Optional.empty();
              }
              return Optional.of(new Range(low.get(), high.get()));
            });
  }

  /** A place as two lengths in brackets. */
  Optional<Point> point(Node node) {
    return pair(node, "[120 um, -40 um]")
        .flatMap(
            pair -> {
              Optional<Length> x = length(pair.get(0), Sign.ANY);
              Optional<Length> y = length(pair.get(1), Sign.ANY);
              return x.isEmpty() || y.isEmpty()
                  ? Optional.empty()
                  : Optional.of(new Point(x.get().metres(), y.get().metres()));
            });
  }

  /** The two items of a list. */
  Optional<List<Node>> pair(Node node, String example) {
    return list(node, example)
        .map(Node.Sequence::items)
        .filter(
            items -> {
              if (items.size() == 2) {
                return true;
              }
              problems.error(
                  node,
                  node.name() + " has " + items.size() + " values, where two are expected",
                  "write for example " + node.name() + ": " + example);
              return false;
            });
  }

  /** The value when it lies between two limits, both included. */
  <T extends Comparable<T>> Optional<T> within(
      Node node, T value, T low, T high, String whose, Function<T, String> print) {
    boolean less = value.compareTo(low) < 0;
    if (!less && value.compareTo(high) <= 0) {
      return Optional.of(value);
    }
    problems.error(
        node,
        node.name()
            + " is "
            + written(node)
            + (less ? ", less than the least of " : ", more than the most of ")
            + whose
            + ", "
            + print.apply(less ? low : high),
        "write " + print.apply(low) + " to " + print.apply(high));
    return Optional.empty();
  }

  /** A node's text as it is written. */
  static String written(Node node) {
    return node instanceof Node.Scalar scalar ? Printed.quoted(scalar.text()) : node.kind();
  }

  private <T> Optional<T> parsed(Node node, String example, Function<String, T> parser) {
    return scalar(node, example)
        .flatMap(
            scalar -> {
              try {
                return Optional.of(parser.apply(scalar.text()));
              } catch (QuantityFormatException refused) {
                problems.error(
                    node,
                    node.name() + ": " + Printed.line(refused.reason()),
                    Printed.line(refused.advice()));
                return Optional.empty();
              }
            });
  }

  private boolean signed(Node node, int signum, Sign sign) {
    if (sign == Sign.POSITIVE && signum <= 0) {
      problems.error(node, node.name() + " is " + written(node), "write a value above zero");
      return false;
    }
    if (sign == Sign.NOT_NEGATIVE && signum < 0) {
      problems.error(node, node.name() + " is " + written(node), "write zero or a value above it");
      return false;
    }
    return true;
  }
}
