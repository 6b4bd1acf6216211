package beamwarden.document;

import beamwarden.beam.Mode;
import beamwarden.document.Quantities.Sign;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.Column;
import beamwarden.instrument.CurrentMeter;
import beamwarden.instrument.Field;
import beamwarden.instrument.ModeAbility;
import beamwarden.instrument.Stage;
import beamwarden.profile.Profile;
import beamwarden.shift.ShiftRule;
import java.time.Duration;
import java.time.ZoneId;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.stream.Stream;

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
              "re-arm",
              "changes")
          .accepting(List.of("gratings"));

  /** Changes that this version makes by itself, so that none of them may need hands. */
  private static final List<String> MADE = List.of("voltage", "current", "mode", "filter", "stage");

  /** Changes that it never makes, so that it does not matter who could. */
  private static final List<String> NEVER_MADE =
      List.of(
          "pulsing", "aperture", "fibre", "grating", "slit", "analyser", "mirror", "temperature");

  private static final String ZONE_EXAMPLE = "Europe/Ljubljana";
  private static final int USUAL_RETRIES = 3;

  private final Values values;
  private final Quantities quantities;
  private final Problems problems;
  private final ColumnReader columns;
  private final BlankerReader blankers;
  private final StageReader stages;

  ProfileReader(Problems problems) {
    this.problems = problems;
    this.values = new Values(problems);
    this.quantities = new Quantities(values, problems);
    this.columns = new ColumnReader(values, problems);
    this.blankers = new BlankerReader(values, problems);
    this.stages = new StageReader(values, problems);
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
    Fields fields = new Fields(group, KEYS, problems);
    Optional<Blanker> blanker = fields.need("blanker", BlankerReader.EXAMPLE, blankers::blanker);
    Optional<Abilities> abilities = abilities(fields, blanker);
    Optional<String> adapter =
        fields.need("adapter", "simulated", node -> values.id(node, "simulated"));
    Map<String, String> options = fields.or("options", Map.of(), this::options);
    Optional<ZoneId> zone = fields.need("time-zone", ZONE_EXAMPLE, this::zone);
    Optional<Duration> windDown =
        fields.need("wind-down", "10 min", node -> quantities.time(node, Sign.POSITIVE));
    List<ShiftRule> shifts = new ShiftsReader(blanker, windDown, values, problems).read(fields);
    int retries =
        fields.or(
            "retries",
            USUAL_RETRIES,
            node -> values.whole(node, 0, Limits.RETRIES).map(Long::intValue));
    fields.get("re-arm").ifPresent(this::checkRearm);
    fields.get("changes").ifPresent(this::checkChanges);
    return Values.all(abilities, adapter, zone, windDown)
        ? Optional.of(
            new Profile(
                abilities.get(),
                adapter.get(),
                options,
                zone.get(),
                windDown.get(),
                shifts,
                retries))
        : Optional.empty();
  }

  private Optional<Abilities> abilities(Fields fields, Optional<Blanker> blanker) {
    Optional<String> name =
        fields.need("instrument", "north-room", node -> values.id(node, "north-room"));
    Optional<Stage> stage = fields.need("stage", StageReader.STAGE_EXAMPLE, stages::stage);
    Optional<Field> field = fields.need("field", StageReader.FIELD_EXAMPLE, stages::field);
    Optional<Column> column = columns.column(fields);
    Optional<CurrentMeter> meter = columns.meter(fields);
    FiltersReader.Filters filters =
        fields.or("filters", FiltersReader.NONE, new FiltersReader(values, problems)::read);
    Optional<Map<Mode, ModeAbility>> modes =
        fields.need("modes", ModesReader.EXAMPLE, new ModesReader(blanker, values, problems)::read);
    return Values.all(name, stage, field, column, meter, blanker, modes)
        ? Optional.of(
            new Abilities(
                name.get(),
                stage.get(),
                field.get(),
                column.get(),
                meter.get(),
                blanker.get(),
                filters.byName(),
                filters.change(),
                modes.get(),
                fields.or("probe", List.of(), columns::probes)))
        : Optional.empty();
  }

  private Optional<Map<String, String>> options(Node node) {
    Map<String, String> options = new LinkedHashMap<>();
    Optional<Node.Mapping> group = values.group(node, "{ seed: 7 }");
    for (Node.Field option : group.map(Node.Mapping::fields).orElse(List.of())) {
      Optional<String> name = values.id(option.key(), "seed");
      Optional<String> text = values.text(option.value(), "7");
      if (Values.all(name, text)) {
        options.put(name.get(), text.get());
      }
    }
    return group.map(found -> options);
  }

  private Optional<ZoneId> zone(Node node) {
    Set<String> known = ZoneId.getAvailableZoneIds();
    Optional<String> name = values.scalar(node, ZONE_EXAMPLE).map(Node.Scalar::text);
    if (name.isPresent() && !known.contains(name.get())) {
      problems.error(
          node,
          Printed.quoted(name.get()) + " is no time zone",
          () -> Near.question(name.get(), known).orElse("write for example " + ZONE_EXAMPLE));
    }
    return name.filter(known::contains).map(ZoneId::of);
  }

  /** A change that needs hands must not be made while nobody is there, and none is ever made. */
  private void checkChanges(Node node) {
    List<String> known = Stream.concat(MADE.stream(), NEVER_MADE.stream()).toList();
    Optional<Node.Mapping> group = values.group(node, "{ pulsing: attended }");
    for (Node.Field change : group.map(Node.Mapping::fields).orElse(List.of())) {
      Optional<String> name = values.known(change.key(), known, "there is no change of", "pulsing");
      Optional<Boolean> attended =
          values.choice(
              change.value(),
              Map.of("attended", true, "automatic", false),
              List.of("attended", "automatic"));
      if (Values.all(name, attended) && attended.get() && MADE.contains(name.get())) {
        problems.error(
            change.value(),
            Keys.notRunMessage("a change of " + name.get() + " that needs hands"),
            "write automatic when it needs none; else wait for a version that plans it");
      }
    }
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
