package beamwarden.document;

import beamwarden.document.Quantities.Range;
import beamwarden.document.Quantities.Sign;
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

  private static final String VOLTAGES = "[1 kV, 30 kV]";
  private static final String CURRENTS = "[2 pA, 40 nA]";
  private static final String VOLTAGE_EXAMPLE = "{ range: " + VOLTAGES + ", settling: 12 min }";
  private static final String CURRENT_EXAMPLE =
      "{ range: "
          + CURRENTS
          + ", settling: 2 min, meter: 3 %, meter-floor: 0.2 pA, reading-every: PT1H,"
          + " drift: 10 % }";
  private static final String PROBE_EXAMPLE = "{ voltage: 8 kV, current: 350 pA, diameter: 6 nm }";
  private static final String MOST_TOLERANCE = "50 %";
  private static final Duration USUAL_READING = Duration.ofSeconds(30);

  private final Values values;
  private final Quantities quantities;
  private final Problems problems;

  ColumnReader(Values values, Problems problems) {
    this.values = values;
    this.problems = problems;
    this.quantities = new Quantities(values, problems);
  }

  Optional<Column> column(Fields profile) {
    Optional<Fields> voltage =
        profile.need(
            "voltage", VOLTAGE_EXAMPLE, node -> values.fields(node, VOLTAGE_EXAMPLE, VOLTAGE));
    Optional<Fields> current =
        profile.need(
            "current", CURRENT_EXAMPLE, node -> values.fields(node, CURRENT_EXAMPLE, CURRENT));
    Optional<Range<Voltage>> volts =
        voltage.flatMap(found -> found.need("range", VOLTAGES, this::voltages));
    Optional<Range<Current>> amperes =
        current.flatMap(found -> found.need("range", CURRENTS, this::currents));
    Optional<Duration> voltageSettling = voltage.flatMap(found -> settling(found, "12 min"));
    Optional<Duration> currentSettling = current.flatMap(found -> settling(found, "2 min"));
    return Values.all(volts, amperes, voltageSettling, currentSettling)
        ? Optional.of(
            new Column(
                volts.get().low(),
                volts.get().high(),
                voltageSettling.get(),
                amperes.get().low(),
                amperes.get().high(),
                currentSettling.get()))
        : Optional.empty();
  }

  private Optional<Range<Voltage>> voltages(Node node) {
    return quantities.range(node, VOLTAGES, quantities::voltage);
  }

  private Optional<Range<Current>> currents(Node node) {
    return quantities.range(node, CURRENTS, quantities::current);
  }

  private Optional<Duration> settling(Fields fields, String example) {
    return fields.need("settling", example, node -> quantities.time(node, Sign.NOT_NEGATIVE));
  }

  /** How the current is measured; it stands among the keys of the current. */
  Optional<CurrentMeter> meter(Fields profile) {
    if (!(profile.get("current").orElse(null) instanceof Node.Mapping group)) {
      return Optional.empty();
    }
    Fields fields = new Fields(group, CURRENT, problems);
    Optional<Double> tolerance = fields.need("meter", "3 %", this::tolerance);
    Optional<Double> drift = fields.need("drift", "10 %", this::tolerance);
    Optional<Double> floor =
        fields.need(
            "meter-floor",
            "0.2 pA",
            node -> quantities.number(node, Dimension.CURRENT, Sign.NOT_NEGATIVE));
    Optional<Duration> every =
        fields.need("reading-every", "PT1H", node -> quantities.time(node, Sign.POSITIVE));
    Duration takes =
        fields.or("reading-takes", USUAL_READING, node -> quantities.time(node, Sign.NOT_NEGATIVE));
    if (every.isPresent() && every.get().compareTo(takes) <= 0) {
      problems.error(
          fields.get("reading-every").orElse(group),
          "readings come every "
              + Printed.time(every.get())
              + " and take "
              + Printed.time(takes)
              + " each, so that no time is left",
          "write a longer reading-every");
    }
    return Values.all(tolerance, drift, floor, every)
        ? Optional.of(
            new CurrentMeter(
                tolerance.get(), new Current(floor.get()), drift.get(), every.get(), takes))
        : Optional.empty();
  }

  private Optional<Double> tolerance(Node node) {
    return quantities.part(node, MOST_TOLERANCE);
  }

  /** The measured probes, those with problems left out. */
  Optional<List<Probe>> probes(Node node) {
    List<Probe> probes = new ArrayList<>();
    Optional<Node.Sequence> list = values.list(node, "[" + PROBE_EXAMPLE + "]");
    for (Node item : list.map(Node.Sequence::items).orElse(List.of())) {
      values.fields(item, PROBE_EXAMPLE, PROBE).flatMap(this::probe).ifPresent(probes::add);
    }
    return Optional.of(probes);
  }

  private Optional<Probe> probe(Fields fields) {
    Optional<Voltage> voltage = fields.need("voltage", "8 kV", quantities::voltage);
    Optional<Current> current = fields.need("current", "350 pA", quantities::current);
    Optional<Length> diameter =
        fields.need("diameter", "6 nm", node -> quantities.length(node, Sign.POSITIVE));
    return Values.all(voltage, current, diameter)
        ? Optional.of(new Probe(voltage.get(), current.get(), diameter.get()))
        : Optional.empty();
  }
}
