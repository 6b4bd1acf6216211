package beamwarden.document;

import beamwarden.beam.Conditions;
import beamwarden.beam.Mode;
import beamwarden.document.Values.Sign;
import beamwarden.instrument.ModeAbility;
import beamwarden.profile.Profile;
import beamwarden.queue.Acquisition;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalLong;
import java.util.Set;
import java.util.TreeMap;

/** Reads how a job looks: its mode, and what that mode needs. */
final class AcquisitionReader {
  /** The modes that this version runs, each with the keys that have a meaning for it alone. */
  private static final Map<Mode, Set<String>> RUN =
      new TreeMap<>(
          Map.of(
              Mode.ELECTRON_IMAGE, Set.of("dwell", "pixels", "frames"),
              Mode.INTENSITY_MAP, Set.of("dwell", "pixels", "frames", "filters", "also"),
              Mode.PHOTON_CORRELATION, Set.of("until")));

  private static final List<String> OF_SOME_MODES =
      List.of("dwell", "pixels", "frames", "filters", "also", "until");
  private static final Keys UNTIL = Keys.of("until", "coincidences", "at-most");
  private static final String UNTIL_EXAMPLE = "{ coincidences: 20000, at-most: PT3H }";

  private final Profile profile;
  private final Values values;
  private final Problems problems;

  AcquisitionReader(Profile profile, Values values, Problems problems) {
    this.profile = profile;
    this.values = values;
    this.problems = problems;
  }

  static List<String> runModes() {
    return RUN.keySet().stream().map(Mode::text).toList();
  }

  /** The job's mode, when this version runs it and the instrument has it. */
  Optional<Mode> mode(Fields fields) {
    return fields
        .need("mode", Mode.INTENSITY_MAP.text())
        .flatMap(node -> mode(node).filter(mode -> runs(node, mode)));
  }

  private Optional<Mode> mode(Node node) {
    Map<String, Mode> meanings = new TreeMap<>();
    for (Mode mode : Mode.values()) {
      meanings.put(mode.text(), mode);
    }
    return values.choice(node, meanings, List.copyOf(meanings.keySet()));
  }

  private boolean runs(Node node, Mode mode) {
    if (!RUN.containsKey(mode)) {
      problems.error(
          node,
          Keys.notRunMessage("a job of mode " + mode.text()),
          "leave the job out, or write " + Printed.anyOf(runModes()));
      return false;
    }
    if (!profile.abilities().modes().containsKey(mode)) {
      problems.error(
          node,
          profile.abilities().instrument() + " has no mode " + mode.text(),
          "write a mode that its profile lists");
      return false;
    }
    return true;
  }

  /** What a job of that mode does at its region. */
  Optional<Acquisition> read(Fields fields, Mode mode) {
    checkKeys(fields, mode);
    ModeAbility ability = profile.abilities().modes().get(mode);
    return mode == Mode.PHOTON_CORRELATION
        ? spot(fields, mode, ability)
        : raster(fields, mode, ability);
  }

  private void checkKeys(Fields fields, Mode mode) {
    JobReader.NOT_RUN.forEach(
        (key, instead) ->
            fields
                .key(key)
                .ifPresent(node -> problems.error(node, Keys.notRunMessage(key), instead)));
    for (String key : OF_SOME_MODES) {
      if (!RUN.get(mode).contains(key)) {
        fields
            .key(key)
            .ifPresent(
                node ->
                    problems.error(
                        node, key + " has no meaning for " + mode.text(), "leave it out"));
      }
    }
  }

  private Optional<Acquisition> raster(Fields fields, Mode mode, ModeAbility ability) {
    Optional<List<Integer>> pixels = fields.need("pixels", "[512, 512]").flatMap(this::pixels);
    Optional<Duration> dwell =
        fields.need("dwell", "25 us").flatMap(node -> dwell(node, mode, ability));
    Optional<List<String>> filters =
        fields.has("filters") && mode == Mode.INTENSITY_MAP
            ? fields.get("filters").flatMap(this::filters)
            : Optional.of(List.of(Conditions.PANCHROMATIC));
    Optional<Integer> frames =
        fields.has("frames")
            ? fields.get("frames").flatMap(node -> count(node, Limits.FRAMES))
            : Optional.of(1);
    fields.get("also").filter(node -> mode == Mode.INTENSITY_MAP).ifPresent(this::also);
    return pixels.isEmpty() || dwell.isEmpty() || filters.isEmpty() || frames.isEmpty()
        ? Optional.empty()
        : Optional.of(
            new Acquisition.Raster(
                mode,
                pixels.get().get(0),
                pixels.get().get(1),
                dwell.get(),
                filters.get(),
                frames.get()));
  }

  private Optional<List<Integer>> pixels(Node node) {
    return values
        .pair(node, "[512, 512]")
        .flatMap(
            pair -> {
              Optional<Integer> columns = count(pair.get(0), Limits.PIXELS);
              Optional<Integer> rows = count(pair.get(1), Limits.PIXELS);
              return columns.isEmpty() || rows.isEmpty()
                  ? Optional.empty()
                  : Optional.of(List.of(columns.get(), rows.get()));
            });
  }

  private Optional<Integer> count(Node node, int most) {
    return values.whole(node, 1, most).map(Long::intValue);
  }

  private Optional<Duration> dwell(Node node, Mode mode, ModeAbility ability) {
    return values
        .time(node, Sign.POSITIVE)
        .flatMap(
            time ->
                values.within(
                    node,
                    time,
                    ability.shortestDwell(),
                    ability.longestDwell(),
                    mode.text() + " on " + profile.abilities().instrument(),
                    Printed::time));
  }

  private Optional<List<String>> filters(Node node) {
    Optional<Node.Sequence> list = values.list(node, "[violet, green]");
    if (list.isEmpty()) {
      return Optional.empty();
    }
    List<String> names = new ArrayList<>();
    for (Node item : list.get().items()) {
      filter(item, names).ifPresent(names::add);
    }
    if (list.get().items().isEmpty()) {
      problems.error(node, "filters is empty", "leave it out for a panchromatic map");
    }
    return Optional.of(names)
        .filter(found -> found.size() == list.get().items().size())
        .filter(found -> !found.isEmpty());
  }

  private Optional<String> filter(Node node, List<String> before) {
    List<String> known = new ArrayList<>(profile.abilities().filters().keySet());
    known.sort(null);
    known.add(Conditions.PANCHROMATIC);
    Optional<String> name = values.scalar(node, Conditions.PANCHROMATIC).map(Node.Scalar::text);
    if (name.isPresent() && !known.contains(name.get())) {
      problems.error(
          node,
          profile.abilities().instrument() + " has no filter " + Printed.quoted(name.get()),
          Near.advice(name.get(), known));
      return Optional.empty();
    }
    if (name.isPresent() && before.contains(name.get())) {
      problems.error(
          node,
          "the filter " + name.get() + " is listed twice, which would double its dose",
          "write it once, and frames: 2 when every pass is wanted twice");
      return Optional.empty();
    }
    return name;
  }

  /** The electron image that costs no dose: accepted, for only the image itself is missing. */
  private void also(Node node) {
    values
        .list(node, "[electron-image]")
        .ifPresent(
            list -> {
              for (Node item : list.items()) {
                if (item instanceof Node.Scalar mode
                    && mode.text().equals(Mode.ELECTRON_IMAGE.text())) {
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
            });
  }

  private Optional<Acquisition> spot(Fields fields, Mode mode, ModeAbility ability) {
    Optional<Fields> until =
        fields
            .need("until", UNTIL_EXAMPLE)
            .flatMap(node -> values.group(node, "until: " + UNTIL_EXAMPLE))
            .map(
                group -> {
                  UNTIL.check(group, problems);
                  return new Fields(group, Optional.empty(), UNTIL.of(), problems);
                });
    Optional<Duration> longest =
        until
            .flatMap(found -> found.need("at-most", "PT3H"))
            .flatMap(node -> longest(node, ability));
    Optional<Node> wished = until.flatMap(found -> found.get("coincidences"));
    Optional<Long> coincidences =
        wished.flatMap(node -> values.whole(node, 1, Limits.COINCIDENCES));
    return longest.isEmpty() || wished.isPresent() != coincidences.isPresent()
        ? Optional.empty()
        : Optional.of(
            new Acquisition.Spot(
                mode,
                longest.get(),
                coincidences.map(OptionalLong::of).orElse(OptionalLong.empty())));
  }

  private Optional<Duration> longest(Node node, ModeAbility ability) {
    return values
        .time(node, Sign.POSITIVE)
        .flatMap(
            time ->
                values.within(
                    node,
                    time,
                    ability.shortestDwell(),
                    Limits.TIME,
                    "photon-correlation on " + profile.abilities().instrument(),
                    Printed::time));
  }
}
