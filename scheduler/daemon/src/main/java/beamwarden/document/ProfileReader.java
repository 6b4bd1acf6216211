package beamwarden.document;

import beamwarden.beam.Mode;
import beamwarden.document.Values.Range;
import beamwarden.document.Values.Sign;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.Column;
import beamwarden.instrument.CurrentMeter;
import beamwarden.instrument.Field;
import beamwarden.instrument.ModeAbility;
import beamwarden.instrument.Stage;
import beamwarden.profile.Profile;
import beamwarden.quantity.Dimension;
import beamwarden.shift.ShiftRule;
import java.time.Duration;
import java.time.ZoneId;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;

/** Reads a whole instrument profile. */
final class ProfileReader {
  private static final Keys KEYS =
      Keys.of(
              "a profile",
              "instrument",
              "adapter",
              "options",
              "time-zone",
              "stage",
              "field",
              "voltage",
              "current",
              "probe",
              "blanker",
              "filters",
              "modes",
              "wind-down",
              "shifts",
              "retries",
              "re-arm")
          .described("gratings", "changes");
  private static final Keys STAGE =
      Keys.of("a stage", "x", "y", "speed", "acceleration", "settling", "repeatability");
  private static final Keys FIELD = Keys.of("a field", "largest", "calibration");
  private static final Keys BLANKER = Keys.of("a blanker", "kind", "alone");

  private static final String STAGE_EXAMPLE =
      "{ x: [-25 mm, 25 mm], y: [-25 mm, 25 mm], speed: 1 mm/s, acceleration: 10 mm/s2,"
          + " settling: 2 s, repeatability: 2 um }";
  private static final String FIELD_EXAMPLE = "{ largest: 0.5 mm, calibration: 2 % }";
  private static final String BLANKER_EXAMPLE = "{ kind: fast, alone: 0.1 ms }";
  private static final String MOST_CALIBRATION = "50 %";
  private static final int USUAL_RETRIES = 3;

  private final Values values;
  private final Problems problems;

  ProfileReader(Problems problems) {
    this.problems = problems;
    this.values = new Values(problems);
  }

  Optional<Profile> read(Node top) {
    if (!(top instanceof Node.Mapping group)) {
      problems.error(
          top,
          "the document is " + top.kind() + ", where an instrument profile is expected",
          "begin with instrument: and a name");
      return Optional.empty();
    }
    KEYS.check(group, problems);
    Fields fields = new Fields(group, Optional.empty(), KEYS.of(), problems);
    Optional<Blanker> blanker = fields.need("blanker", BLANKER_EXAMPLE).flatMap(this::blanker);
    Optional<Abilities> abilities = abilities(fields, blanker);
    Optional<String> adapter =
        fields.need("adapter", "simulated").flatMap(node -> values.id(node, "simulated"));
    Map<String, String> options = fields.get("options").map(this::options).orElse(Map.of());
    Optional<ZoneId> zone = fields.need("time-zone", "Europe/Ljubljana").flatMap(this::zone);
    Optional<Duration> windDown =
        fields.need("wind-down", "10 min").flatMap(node -> values.time(node, Sign.POSITIVE));
    List<ShiftRule> shifts = new ShiftsReader(values, problems).read(fields, blanker, windDown);
    int retries =
        fields
            .get("retries")
            .flatMap(node -> values.whole(node, 0, Limits.RETRIES))
            .map(Long::intValue)
            .orElse(USUAL_RETRIES);
    fields.get("re-arm").ifPresent(this::checkRearm);
    if (abilities.isEmpty() || adapter.isEmpty() || zone.isEmpty() || windDown.isEmpty()) {
      return Optional.empty();
    }
    return Optional.of(
        new Profile(
            abilities.get(), adapter.get(), options, zone.get(), windDown.get(), shifts, retries));
  }

  private Optional<Abilities> abilities(Fields fields, Optional<Blanker> blanker) {
    ColumnReader columns = new ColumnReader(values, problems);
    Optional<String> name =
        fields.need("instrument", "north-room").flatMap(node -> values.id(node, "north-room"));
    Optional<Stage> stage = fields.need("stage", STAGE_EXAMPLE).flatMap(this::stage);
    Optional<Field> field = fields.need("field", FIELD_EXAMPLE).flatMap(this::field);
    Optional<Column> column = columns.column(fields);
    Optional<CurrentMeter> meter = columns.meter(fields);
    FiltersReader.Filters filters =
        fields
            .get("filters")
            .map(node -> new FiltersReader(values, problems).read(node))
            .orElse(FiltersReader.NONE);
    Map<Mode, ModeAbility> modes =
        fields
            .need("modes", ModesReader.EXAMPLE)
            .map(node -> new ModesReader(values, problems).read(node, blanker))
            .orElse(Map.of());
    if (name.isEmpty()
        || stage.isEmpty()
        || field.isEmpty()
        || column.isEmpty()
        || meter.isEmpty()
        || blanker.isEmpty()) {
      return Optional.empty();
    }
    return Optional.of(
        new Abilities(
            name.get(),
            stage.get(),
            field.get(),
            column.get(),
            meter.get(),
            blanker.get(),
            filters.byName(),
            filters.change(),
            modes,
            fields.get("probe").map(columns::probes).orElse(List.of())));
  }

  private Optional<Stage> stage(Node node) {
    Optional<Fields> fields = values.fields(node, STAGE_EXAMPLE, STAGE);
    if (fields.isEmpty()) {
      return Optional.empty();
    }
    Fields found = fields.get();
    Optional<Range> x = reach(found, "x");
    Optional<Range> y = reach(found, "y");
    Optional<Double> speed =
        found
            .need("speed", "1 mm/s")
            .flatMap(each -> values.number(each, Dimension.SPEED, Sign.POSITIVE));
    Optional<Double> acceleration =
        found
            .need("acceleration", "10 mm/s2")
            .flatMap(each -> values.number(each, Dimension.ACCELERATION, Sign.POSITIVE));
    Optional<Duration> settling =
        found.need("settling", "2 s").flatMap(each -> values.time(each, Sign.NOT_NEGATIVE));
    Optional<Double> repeatability =
        found
            .need("repeatability", "2 um")
            .flatMap(each -> values.number(each, Dimension.LENGTH, Sign.NOT_NEGATIVE));
    if (x.isEmpty()
        || y.isEmpty()
        || speed.isEmpty()
        || acceleration.isEmpty()
        || settling.isEmpty()
        || repeatability.isEmpty()) {
      return Optional.empty();
    }
    return Optional.of(
        new Stage(
            x.get().low().doubleValue(),
            x.get().high().doubleValue(),
            y.get().low().doubleValue(),
            y.get().high().doubleValue(),
            speed.get(),
            acceleration.get(),
            settling.get(),
            repeatability.get()));
  }

  private Optional<Range> reach(Fields fields, String axis) {
    return fields
        .need(axis, "[-25 mm, 25 mm]")
        .flatMap(node -> values.range(node, Dimension.LENGTH, Sign.ANY, "[-25 mm, 25 mm]"));
  }

  private Optional<Field> field(Node node) {
    Optional<Fields> fields = values.fields(node, FIELD_EXAMPLE, FIELD);
    Optional<Double> largest =
        fields
            .flatMap(found -> found.need("largest", "0.5 mm"))
            .flatMap(found -> values.number(found, Dimension.LENGTH, Sign.POSITIVE));
    Optional<Double> calibration =
        fields
            .flatMap(found -> found.need("calibration", "2 %"))
            .flatMap(found -> values.part(found, MOST_CALIBRATION));
    return largest.isEmpty() || calibration.isEmpty()
        ? Optional.empty()
        : Optional.of(new Field(largest.get(), calibration.get()));
  }

  private Optional<Blanker> blanker(Node node) {
    Optional<Fields> fields = values.fields(node, BLANKER_EXAMPLE, BLANKER);
    Optional<Blanker.Kind> kind =
        fields.flatMap(found -> found.need("kind", "fast")).flatMap(this::blankerKind);
    Optional<Node> alone = fields.flatMap(found -> found.get("alone"));
    Optional<Duration> time = alone.flatMap(found -> values.time(found, Sign.POSITIVE));
    return kind.isEmpty() || alone.isPresent() != time.isPresent()
        ? Optional.empty()
        : Optional.of(new Blanker(kind.get(), time));
  }

  private Optional<Blanker.Kind> blankerKind(Node node) {
    Map<String, Blanker.Kind> kinds = new TreeMap<>();
    kinds.put("fast", Blanker.Kind.FAST);
    kinds.put("slow", Blanker.Kind.SLOW);
    kinds.put("none", Blanker.Kind.NONE);
    return values
        .choice(node, kinds, List.of("fast", "slow"))
        .filter(
            kind -> {
              if (kind == Blanker.Kind.NONE) {
                problems.error(
                    node,
                    Keys.notRunMessage("an instrument without a blanker"),
                    "write fast or slow when it has one; else work on it attended, without a queue");
              }
              return kind != Blanker.Kind.NONE;
            });
  }

  private Map<String, String> options(Node node) {
    Map<String, String> options = new LinkedHashMap<>();
    values
        .group(node, "options: { noise: off }")
        .ifPresent(
            group -> {
              for (Node.Field option : group.fields()) {
                values.id(option.key());
                values
                    .text(option.value(), "noise: off")
                    .ifPresent(text -> options.put(option.key().text(), text));
              }
            });
    return options;
  }

  private Optional<ZoneId> zone(Node node) {
    return values
        .scalar(node, "Europe/Ljubljana")
        .map(Node.Scalar::text)
        .flatMap(
            name -> {
              if (ZoneId.getAvailableZoneIds().contains(name)) {
                return Optional.of(ZoneId.of(name));
              }
              problems.error(
                  node,
                  Printed.quoted(name) + " is no time zone",
                  Near.to(name, ZoneId.getAvailableZoneIds())
                      .map(near -> "did you mean " + near + "?")
                      .orElse("write for example Europe/Ljubljana"));
              return Optional.empty();
            });
  }

  private void checkRearm(Node node) {
    if (!(node instanceof Node.Scalar scalar && scalar.text().equals("never"))) {
      problems.error(
          node,
          Keys.notRunMessage("turning the high voltage on again after a trip"),
          "write re-arm: never");
    }
  }
}
