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
import java.util.Optional;
import java.util.function.Function;

/** Reads values with a unit from nodes; what cannot be read is told, and gives nothing. */
final class Quantities {
  private final Problems problems;
  private final Values values;

  Quantities(Values values, Problems problems) {
    this.values = values;
    this.problems = problems;
  }

  /** Which numbers are allowed. */
  enum Sign {
    ANY,
    NOT_NEGATIVE,
    POSITIVE
  }

  /**
   * Two values, the lower one first.
   *
   * @param low the lower one
   * @param high the higher one, or the same
   * @param <T> what they are
   */
  record Range<T>(T low, T high) {}

  Optional<Voltage> voltage(Node node) {
    return number(node, Dimension.VOLTAGE, Sign.POSITIVE).map(Voltage::new);
  }

  Optional<Current> current(Node node) {
    return number(node, Dimension.CURRENT, Sign.POSITIVE).map(Current::new);
  }

  /** A charge of zero or more. */
  Optional<Charge> charge(Node node) {
    return number(node, Dimension.CHARGE, Sign.NOT_NEGATIVE).map(Charge::new);
  }

  /** A fluence of zero or more. */
  Optional<Fluence> fluence(Node node) {
    return number(node, Dimension.FLUENCE, Sign.NOT_NEGATIVE).map(Fluence::new);
  }

  Optional<Length> length(Node node, Sign sign) {
    return number(node, Dimension.LENGTH, sign).map(Length::new);
  }

  /** A time of whole nanoseconds within a year. */
  Optional<Duration> time(Node node, Sign sign) {
    return read(node, Dimension.TIME, QuantityText::duration)
        .filter(time -> allowed(node, time.compareTo(Duration.ZERO), sign))
        .flatMap(time -> within(node, time, Limits.TIME.negated(), Limits.TIME, "any document"));
  }

  /** The value of a quantity in the unit of its dimension. */
  Optional<Double> number(Node node, Dimension dimension, Sign sign) {
    return read(node, dimension, text -> QuantityText.value(text, dimension))
        .filter(value -> allowed(node, value.signum(), sign))
        .map(BigDecimal::doubleValue);
  }

  /** A part of a whole, from zero to {@code most}. */
  Optional<Double> part(Node node, String most) {
    double limit = QuantityText.value(most, Dimension.RATIO).doubleValue();
    Optional<Double> part = number(node, Dimension.RATIO, Sign.NOT_NEGATIVE);
    if (part.isPresent() && part.get() > limit) {
      problems.error(node, node.name() + " is " + Values.written(node), "write 0 % to " + most);
    }
    return part.filter(value -> value <= limit);
  }

  /** Two values in brackets, the lower one first. */
  <T extends Comparable<T>> Optional<Range<T>> range(
      Node node, String example, Function<Node, Optional<T>> reader) {
    Optional<Range<T>> range =
        two(node, example, reader).map(two -> new Range<>(two.get(0), two.get(1)));
    if (range.isPresent() && range.get().low().compareTo(range.get().high()) > 0) {
      problems.error(
          node,
          node.name() + " has its higher end first",
          "write the lower end first, such as " + example);
    }
    return range.filter(found -> found.low().compareTo(found.high()) <= 0);
  }

  /** A place as two lengths in brackets. */
  Optional<Point> point(Node node) {
    return two(node, "[120 um, -40 um]", item -> length(item, Sign.ANY))
        .map(two -> new Point(two.get(0).metres(), two.get(1).metres()));
  }

  /** A width and a height in brackets, both above zero. */
  Optional<List<Length>> size(Node node) {
    return two(node, "[60 um, 60 um]", item -> length(item, Sign.POSITIVE));
  }

  /** An angle, in degrees. */
  Optional<Double> turn(Node node) {
    return number(node, Dimension.ANGLE, Sign.ANY);
  }

  /** The value when it lies between two limits, both included. */
  <T extends Comparable<T>> Optional<T> within(Node node, T value, T low, T high, String whose) {
    boolean less = value.compareTo(low) < 0;
    if (!less && value.compareTo(high) <= 0) {
      return Optional.of(value);
    }
    problems.error(
        node,
        node.name()
            + " is "
            + Values.written(node)
            + (less ? ", below the " : ", above the ")
            + Printed.value(less ? low : high)
            + " that "
            + whose
            + " allows",
        "write " + Printed.value(low) + " to " + Printed.value(high));
    return Optional.empty();
  }

  private <T> Optional<List<T>> two(Node node, String example, Function<Node, Optional<T>> reader) {
    Optional<List<Node>> pair = values.pair(node, example);
    Optional<T> first = pair.flatMap(items -> reader.apply(items.get(0)));
    Optional<T> second = pair.flatMap(items -> reader.apply(items.get(1)));
    return first.flatMap(one -> second.map(other -> List.of(one, other)));
  }

  private <T> Optional<T> read(Node node, Dimension dimension, Function<String, T> parser) {
    Optional<Node.Scalar> scalar = values.scalar(node, dimension.example());
    try {
      return scalar.map(found -> parser.apply(found.text()));
    } catch (QuantityFormatException refused) {
      problems.error(
          node,
          node.name() + ": " + Printed.line(refused.reason()),
          Printed.line(refused.advice()));
      return Optional.empty();
    }
  }

  private boolean allowed(Node node, int signum, Sign sign) {
    boolean allowed = sign == Sign.ANY || signum > 0 || (signum == 0 && sign != Sign.POSITIVE);
    if (!allowed) {
      problems.error(
          node,
          node.name() + " is " + Values.written(node),
          sign == Sign.POSITIVE ? "write a value above zero" : "write zero or a value above it");
    }
    return allowed;
  }
}
