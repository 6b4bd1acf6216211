package beamwarden.document;

import beamwarden.beam.Conditions;
import beamwarden.beam.Mode;
import beamwarden.document.Quantities.Sign;
import beamwarden.instrument.ModeAbility;
import beamwarden.profile.Profile;
import beamwarden.queue.Acquisition;
import java.time.Duration;
import java.util.ArrayList;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalLong;
import java.util.Set;
import java.util.TreeMap;

/** Reads how a job looks: its mode, and what that mode needs. */
final class AcquisitionReader {
  /** Keys of jobs that this version knows and does not run, each with what to write instead. */
  static final Map<String, String> NOT_RUN =
      new TreeMap<>(
          Map.of(
              "integration", "write a job of a mode that is run",
              "analyser", "leave it out; every pass is made without an analyser",
              "grating", "leave it out; a map through filters needs none",
              "slit", "leave it out; a map through filters needs none",
              "repetition", "leave it out; the beam is not pulsed",
              "registration", "leave it out; the uncertainty of the placement covers drift",
              "prior-dose", "leave it out, and set a cap that leaves no room for more"));

  /** Keys that have a meaning for some modes only. */
  private static final Set<String> OF_SOME_MODES =
      Set.of("dwell", "pixels", "frames", "filters", "also", "until");

  /** The modes that this version runs, each with those keys that have a meaning for it. */
  private static final Map<Mode, Set<String>> RUN =
      new EnumMap<>(
          Map.of(
              Mode.ELECTRON_IMAGE, Set.of("dwell", "pixels", "frames"),
              Mode.INTENSITY_MAP, Set.of("dwell", "pixels", "frames", "filters", "also"),
              Mode.PHOTON_CORRELATION, Set.of("until")));

  private static final Keys UNTIL = Keys.of("until", "coincidences", "at-most");
  private static final String UNTIL_EXAMPLE = "{ coincidences: 20000, at-most: PT3H }";
  private static final String PIXELS_EXAMPLE = "[512, 512]";
  private static final String FILTERS_EXAMPLE = "[panchromatic]";

  private final Profile profile;
  private final Values values;
  private final Quantities quantities;
  private final Problems problems;

  AcquisitionReader(Profile profile, Values values, Problems problems) {
    this.profile = profile;
    this.values = values;
    this.problems = problems;
    this.quantities = new Quantities(values, problems);
  }

  /** The names of the modes that this version runs. */
  static List<String> runModes() {
    return RUN.keySet().stream().map(Mode::text).toList();
  }

  /** The job's mode, when this version runs it and the instrument has it. */
  Optional<Mode> mode(Fields fields) {
    return fields.need(
        "mode", Mode.INTENSITY_MAP.text(), node -> mode(node).filter(mode -> runs(node, mode)));
  }

  private Optional<Mode> mode(Node node) {
    Map<String, Mode> meanings = new TreeMap<>();
    for (Mode mode : Mode.values()) {
      meanings.put(mode.text(), mode);
    }
    return values.choice(node, meanings, List.copyOf(meanings.keySet()));
  }

  private boolean runs(Node node, Mode mode) {
    boolean run = RUN.containsKey(mode);
    boolean offered = profile.abilities().modes().containsKey(mode);
    if (!run) {
      problems.error(
          node,
          Keys.notRunMessage("a job of mode " + mode.text()),
          "leave the job out, or write " + Printed.anyOf(runModes()));
    } else if (!offered) {
      problems.error(
          node,
          profile.abilities().instrument() + " does not offer the mode " + mode.text(),
          "leave the job out, or write a mode that the profile lists");
    }
    return run && offered;
  }

  /** What a job of that mode does at its region. */
  Optional<Acquisition> read(Fields fields, Mode mode) {
    checkKeys(fields, mode);
    ModeAbility ability = profile.abilities().modes().get(mode);
    return mode == Mode.PHOTON_CORRELATION ? spot(fields, ability) : raster(fields, mode, ability);
  }

  private void checkKeys(Fields fields, Mode mode) {
    NOT_RUN.forEach(
        (key, instead) ->
            fields
                .key(key)
                .ifPresent(node -> problems.error(node, Keys.notRunMessage(key), instead)));
    OF_SOME_MODES.stream()
        .filter(key -> !RUN.get(mode).contains(key))
        .flatMap(key -> fields.key(key).stream())
        .forEach(
            node ->
                problems.error(
                    node, node.text() + " has no meaning for " + mode.text(), "leave it out"));
  }

  private Optional<Acquisition> raster(Fields fields, Mode mode, ModeAbility ability) {
    boolean map = mode == Mode.INTENSITY_MAP;
    Optional<List<Integer>> pixels = fields.need("pixels", PIXELS_EXAMPLE, this::pixels);
    Optional<Duration> dwell =
        fields.need("dwell", "25 us", node -> time(node, ability, ability.longestDwell(), mode));
    List<String> all = List.of(Conditions.PANCHROMATIC);
    List<String> filters = map ? fields.or("filters", all, this::filters) : all;
    int frames = fields.or("frames", 1, node -> count(node, Limits.FRAMES));
    fields.get("also").filter(node -> map).ifPresent(this::also);
    if (!Values.all(pixels, dwell)) {
      return Optional.empty();
    }
    List<Integer> size = pixels.get();
    return Optional.of(
        new Acquisition.Raster(mode, size.get(0), size.get(1), dwell.get(), filters, frames));
  }

  private Optional<List<Integer>> pixels(Node node) {
    Optional<List<Node>> pair = values.pair(node, PIXELS_EXAMPLE);
    Optional<Integer> columns = pair.flatMap(items -> count(items.get(0), Limits.PIXELS));
    Optional<Integer> rows = pair.flatMap(items -> count(items.get(1), Limits.PIXELS));
    return columns.flatMap(width -> rows.map(height -> List.of(width, height)));
  }

  private Optional<Integer> count(Node node, int most) {
    return values.whole(node, 1, most).map(Long::intValue);
  }

  private Optional<Duration> time(Node node, ModeAbility ability, Duration longest, Mode mode) {
    String whose = mode.text() + " on " + profile.abilities().instrument();
    return quantities
        .time(node, Sign.POSITIVE)
        .flatMap(time -> quantities.within(node, time, ability.shortestDwell(), longest, whose));
  }

  private Optional<List<String>> filters(Node node) {
    List<String> known = new ArrayList<>(profile.abilities().filters().keySet());
    known.sort(null);
    known.add(Conditions.PANCHROMATIC);
    String unknown = profile.abilities().instrument() + " has no filter";
    List<String> names = new ArrayList<>();
    for (Node item : values.items(node, FILTERS_EXAMPLE)) {
      values
          .known(item, known, unknown, Conditions.PANCHROMATIC)
          .filter(name -> isNew(name, names, item))
          .ifPresent(names::add);
    }
    return Optional.of(names).filter(found -> !found.isEmpty());
  }

  private boolean isNew(String filter, List<String> before, Node node) {
    boolean isNew = !before.contains(filter);
    if (!isNew) {
      problems.error(
          node,
          "the filter " + filter + " is listed twice, which would double its dose",
          "write it once, and frames: 2 when every pass is wanted twice");
    }
    return isNew;
  }

  /** An image of the electron detector beside a map costs no dose, so that leaving it is safe. */
  private void also(Node node) {
    for (Node item : values.items(node, "[electron-image]")) {
      if (item instanceof Node.Scalar mode && mode.text().equals(Mode.ELECTRON_IMAGE.text())) {
        problems.warning(
            item,
            "the electron image beside a map is not recorded by this version",
            "leave also out, or write a job of mode electron-image, which costs dose");
      } else {
        problems.error(
            item,
            Values.written(item) + " cannot be recorded beside a map",
            "write a job of its own for it");
      }
    }
  }

  private Optional<Acquisition> spot(Fields fields, ModeAbility ability) {
    Optional<Fields> until =
        fields.need("until", UNTIL_EXAMPLE, node -> values.fields(node, UNTIL_EXAMPLE, UNTIL));
    Optional<Duration> longest =
        until.flatMap(
            found ->
                found.need(
                    "at-most",
                    "PT3H",
                    node -> time(node, ability, Limits.BEAM_ON, Mode.PHOTON_CORRELATION)));
    Optional<Long> coincidences =
        until
            .flatMap(found -> found.get("coincidences"))
            .flatMap(node -> values.whole(node, 1, Limits.COINCIDENCES));
    OptionalLong enough = coincidences.map(OptionalLong::of).orElse(OptionalLong.empty());
    return longest.map(time -> new Acquisition.Spot(Mode.PHOTON_CORRELATION, time, enough));
  }
}
