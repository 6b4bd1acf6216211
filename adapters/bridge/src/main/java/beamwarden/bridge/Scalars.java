package beamwarden.bridge;

import java.time.DateTimeException;
import java.time.Duration;
import java.util.OptionalDouble;
import tools.jackson.core.JsonGenerator;
import tools.jackson.core.JsonParser;
import tools.jackson.core.JsonToken;
import tools.jackson.databind.DeserializationContext;
import tools.jackson.databind.SerializationContext;
import tools.jackson.databind.deser.std.StdScalarDeserializer;
import tools.jackson.databind.ser.std.StdSerializer;

/** The form of durations and of numbers. */
final class Scalars {
  private Scalars() {}

  /** A duration in ISO 8601, in seconds alone: one form for a reader in any language. */
  static String text(Duration time) {
    // Below zero the seconds are rounded down and the nanoseconds count up from there.
    boolean below = time.isNegative();
    long seconds = time.getSeconds() + (below && time.getNano() > 0 ? 1 : 0);
    int nanos = below && time.getNano() > 0 ? 1_000_000_000 - time.getNano() : time.getNano();
    String sign = below && seconds == 0 ? "-" : "";
    return "PT" + sign + seconds + fraction(nanos) + "S";
  }

  private static String fraction(int nanos) {
    if (nanos == 0) {
      return "";
    }
    String digits = Integer.toString(1_000_000_000 + nanos).substring(1);
    return "." + digits.replaceFirst("0+$", "");
  }

  static final class DurationWriter extends StdSerializer<Duration> {
    DurationWriter() {
      super(Duration.class);
    }

    @Override
    public void serialize(Duration time, JsonGenerator to, SerializationContext context) {
      to.writeString(text(time));
    }
  }

  static final class DurationReader extends StdScalarDeserializer<Duration> {
    DurationReader() {
      super(Duration.class);
    }

    @Override
    public Duration deserialize(JsonParser from, DeserializationContext context) {
      if (!from.hasToken(JsonToken.VALUE_STRING)) {
        return context.reportInputMismatch(this, "a duration is text such as PT12.5S");
      }
      String text = from.getString();
      try {
        return Duration.parse(text);
      } catch (DateTimeException e) {
        return context.reportInputMismatch(this, "'%s' is no duration such as PT12.5S", text);
      }
    }
  }

  static final class FiniteWriter extends StdSerializer<Double> {
    FiniteWriter() {
      super(Double.class);
    }

    @Override
    public void serialize(Double value, JsonGenerator to, SerializationContext context) {
      if (!Double.isFinite(value)) {
        context.reportMappingProblem("%s cannot be written as a number", value);
      }
      to.writeNumber(value.doubleValue());
    }
  }

  static final class FiniteReader extends StdScalarDeserializer<Double> {
    FiniteReader() {
      super(Double.class);
    }

    @Override
    public Double deserialize(JsonParser from, DeserializationContext context) {
      if (from.hasToken(JsonToken.VALUE_NUMBER_INT)
          || from.hasToken(JsonToken.VALUE_NUMBER_FLOAT)) {
        double value = from.getDoubleValue();
        if (Double.isFinite(value)) {
          return value;
        }
      }
      return context.reportInputMismatch(
          this, "a finite number is meant, not '%s'", from.getString());
    }
  }

  static final class OptionalFiniteWriter extends StdSerializer<OptionalDouble> {
    OptionalFiniteWriter() {
      super(OptionalDouble.class);
    }

    @Override
    public boolean isEmpty(SerializationContext context, OptionalDouble value) {
      return value.isEmpty();
    }

    @Override
    public void serialize(OptionalDouble value, JsonGenerator to, SerializationContext context) {
      if (value.isPresent()) {
        new FiniteWriter().serialize(value.getAsDouble(), to, context);
      } else {
        to.writeNull();
      }
    }
  }

  static final class OptionalFiniteReader extends StdScalarDeserializer<OptionalDouble> {
    OptionalFiniteReader() {
      super(OptionalDouble.class);
    }

    @Override
    public Object getNullValue(DeserializationContext context) {
      return OptionalDouble.empty();
    }

    @Override
    public OptionalDouble deserialize(JsonParser from, DeserializationContext context) {
      return OptionalDouble.of(new FiniteReader().deserialize(from, context));
    }
  }
}
