package beamwarden.document;

import beamwarden.document.Values.Range;
import beamwarden.document.Values.Sign;
import beamwarden.instrument.Column;
import beamwarden.instrument.CurrentMeter;
import beamwarden.instrument.Probe;
import beamwarden.quantity.Current;
import beamwarden.quantity.Dimension;
import beamwarden.quantity.Length;
import beamwarden.quantity.Voltage;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/** Reads what a profile says of the electron column: voltage, current, its meter, the probe. */
final class ColumnReader {
  private static final String CONTINUOUS = "leave it out; any setting within the range is taken";
  private static final Keys VOLTAGE =
      Keys.of("voltage", "range", "settling").notRun(Map.of("steps", CONTINUOUS));
  private static final Keys CURRENT =
      Keys.of(
              "current",
              "range",
              "settling",
              "meter",
              "meter-floor",
              "reading-every",
              "reading-takes",
              "drift")
          .notRun(Map.of("steps", CONTINUOUS));
  private static final Keys PROBE = Keys.of("a probe", "voltage", "current", "diameter");

  private static final String VOLTAGE_EXAMPLE = "{ range: [1 kV, 30 kV], settling: 12 min }";
  private static final String CURRENT_EXAMPLE =
      "{ range: [2 pA, 40 nA], settling: 2 min, meter: 3 %, meter-floor: 0.2 pA,"
          + " reading-every: PT1H, drift: 10 % }";
  private static final String PROBE_EXAMPLE = "{ voltage: 8 kV, current: 350 pA, diameter: 6 nm }";
  private static final String MOST_TOLERANCE = "50 %";
  private static final Duration USUAL_READING = Duration.ofSeconds(30);

  private final Values values;
  private final Problems problems;

  ColumnReader(Values values, Problems problems) {
    this.values = values;
    this.problems = problems;
  }

  Optional<Column> column(Fields profile) {
    Optional<Fields> voltage =
        profile
            .need("voltage", VOLTAGE_EXAMPLE)
            .flatMap(node -> values.fields(node, VOLTAGE_EXAMPLE, VOLTAGE));
    Optional<Fields> current =
        profile
            .need("current", CURRENT_EXAMPLE)
            .flatMap(node -> values.fields(node, CURRENT_EXAMPLE, CURRENT));
    Optional<Range> volts =
        voltage.flatMap(found -> range(found, Dimension.VOLTAGE, "[1 kV, 30 kV]"));
    Optional<Range> amperes =
        current.flatMap(found -> range(found, Dimension.CURRENT, "[2 pA, 40 nA]"));
    Optional<Duration> voltageSettling = voltage.flatMap(found -> settling(found, "12 min"));
    Optional<Duration> currentSettling = current.flatMap(found -> settling(found, "2 min"));
    return volts.isEmpty()
            || amperes.isEmpty()
            || voltageSettling.isEmpty()
            || currentSettling.isEmpty()
        ? Optional.empty()
        : Optional.of(
            new Column(
                new Voltage(volts.get().low().doubleValue()),
                new Voltage(volts.get().high().doubleValue()),
                voltageSettling.get(),
                new Current(amperes.get().low().doubleValue()),
                new Current(amperes.get().high().doubleValue()),
                currentSettling.get()));
  }

  private Optional<Range> range(Fields fields, Dimension dimension, String example) {
    return fields
        .need("range", example)
        .flatMap(node -> values.range(node, dimension, Sign.POSITIVE, example));
  }

  private Optional<Duration> settling(Fields fields, String example) {
    return fields.need("settling", example).flatMap(node -> values.time(node, Sign.NOT_NEGATIVE));
  }

  Optional<CurrentMeter> meter(Fields profile) {
    if (!(profile.get("current").orElse(null) instanceof Node.Mapping group)) {
      return Optional.empty();
    }
    Fields fields = new Fields(group, Optional.empty(), CURRENT.of(), problems);
    Optional<Double> tolerance = part(fields, "meter", "3 %");
    Optional<Double> drift = part(fields, "drift", "10 %");
    Optional<Current> floor =
        fields
            .need("meter-floor", "0.2 pA")
            .flatMap(node -> values.current(node, Sign.NOT_NEGATIVE));
    Optional<Duration> every =
        fields.need("reading-every", "PT1H").flatMap(node -> values.time(node, Sign.POSITIVE));
    Optional<Duration> takes =
        fields.has("reading-takes")
            ? fields.get("reading-takes").flatMap(node -> values.time(node, Sign.NOT_NEGATIVE))
            : Optional.of(USUAL_READING);
    return tolerance.isEmpty()
            || drift.isEmpty()
            || floor.isEmpty()
            || every.isEmpty()
            || takes.isEmpty()
        ? Optional.empty()
        : Optional.of(
            new CurrentMeter(tolerance.get(), floor.get(), drift.get(), every.get(), takes.get()));
  }

  private Optional<Double> part(Fields fields, String key, String example) {
    return fields.need(key, example).flatMap(node -> values.part(node, MOST_TOLERANCE));
  }

  /** The measured probes, those with problems left out. */
  List<Probe> probes(Node node) {
    List<Probe> probes = new ArrayList<>();
    values
        .list(node, "[" + PROBE_EXAMPLE + "]")
        .ifPresent(list -> list.items().forEach(item -> probe(item).ifPresent(probes::add)));
    return probes;
  }

  private Optional<Probe> probe(Node node) {
    Optional<Fields> fields = values.fields(node, PROBE_EXAMPLE, PROBE);
    Optional<Voltage> voltage =
        fields.flatMap(found -> found.need("voltage", "8 kV")).flatMap(values::voltage);
    Optional<Current> current =
        fields
            .flatMap(found -> found.need("current", "350 pA"))
            .flatMap(found -> values.current(found, Sign.POSITIVE));
    Optional<Length> diameter =
        fields
            .flatMap(found -> found.need("diameter", "6 nm"))
            .flatMap(found -> values.length(found, Sign.POSITIVE));
    return voltage.isEmpty() || current.isEmpty() || diameter.isEmpty()
        ? Optional.empty()
        : Optional.of(new Probe(voltage.get(), current.get(), diameter.get()));
  }
}
