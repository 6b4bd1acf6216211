package beamwarden.document;

import beamwarden.beam.Mode;
import beamwarden.document.Quantities.Range;
import beamwarden.document.Quantities.Sign;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.ModeAbility;
import beamwarden.instrument.ModeAbility.Boundary;
import beamwarden.quantity.Length;
import java.time.Duration;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.Stream;

/** Reads the modes of a profile; those that this version does not run are left out. */
final class ModesReader {
  static final String EXAMPLE = "{ electron-image: { dwell: [0.1 us, 100 us], stops-at: line } }";

  private static final Keys RASTER =
      Keys.of("a mode", "dwell", "field", "flyback", "frame-start", "stops-at")
          .notRun(Map.of("readout", "leave it out; pixels are read while the next is exposed"));
  private static final Keys SPOT =
      Keys.of("a mode", "slice", "frame-start", "stops-at").accepting(List.of("bin"));
  private static final Keys NOT_RUN =
      Keys.of("a mode", "dwell", "integration", "field", "stops-at")
          .accepting(
              List.of(
                  "readout",
                  "bin",
                  "analyser-change",
                  "flyback",
                  "frame-start",
                  "repetition",
                  "slice"));
  private static final String DWELL = "[0.2 us, 10 ms]";

  /** The least of a slice that is worth an exposure of its own. */
  private static final Duration SHORTEST_SLICE = Duration.ofSeconds(1);

  private final Optional<Blanker> blanker;
  private final Values values;
  private final Quantities quantities;
  private final Problems problems;

  /** Reads modes of an instrument with that blanker. */
  ModesReader(Optional<Blanker> blanker, Values values, Problems problems) {
    this.blanker = blanker;
    this.values = values;
    this.problems = problems;
    this.quantities = new Quantities(values, problems);
  }

  Optional<Map<Mode, ModeAbility>> read(Node node) {
    Optional<Node.Mapping> group = values.group(node, EXAMPLE);
    Map<Mode, ModeAbility> modes = new EnumMap<>(Mode.class);
    boolean anyRun = false;
    for (Node.Field field : group.map(Node.Mapping::fields).orElse(List.of())) {
      Optional<Mode> mode = mode(field.key());
      anyRun |= mode.isEmpty() || AcquisitionReader.runModes().contains(mode.get().text());
      mode.flatMap(known -> ability(known, field.value()))
          .ifPresent(ability -> modes.put(mode.get(), ability));
    }
    if (group.isPresent() && !anyRun) {
      problems.error(
          node,
          "there is no mode that this version runs",
          "write " + Printed.anyOf(AcquisitionReader.runModes()));
    }
    return group.map(found -> modes);
  }

  private Optional<Mode> mode(Node.Scalar key) {
    List<String> names = Stream.of(Mode.values()).map(Mode::text).toList();
    return values.known(key, names, "there is no mode", "electron-image").flatMap(Mode::named);
  }

  private Optional<ModeAbility> ability(Mode mode, Node node) {
    return switch (mode) {
      case ELECTRON_IMAGE, INTENSITY_MAP ->
          values
              .fields(node, "{ dwell: " + DWELL + ", stops-at: line }", RASTER)
              .flatMap(this::raster);
      case PHOTON_CORRELATION ->
          values.fields(node, "{ slice: 30 s, stops-at: slice }", SPOT).flatMap(this::spot);
      case SPECTRAL_MAP, ANGULAR_PATTERN, DECAY_TRACE -> {
        values.fields(node, "{ stops-at: line }", NOT_RUN);
        yield Optional.empty();
      }
    };
  }

  private Optional<ModeAbility> raster(Fields fields) {
    Optional<Range<Duration>> dwell =
        fields.need(
            "dwell",
            DWELL,
            node -> quantities.range(node, DWELL, item -> quantities.time(item, Sign.POSITIVE)));
    Optional<Length> field =
        fields.get("field").flatMap(node -> quantities.length(node, Sign.POSITIVE));
    boolean slow = blanker.filter(known -> known.kind() == Blanker.Kind.SLOW).isPresent();
    Optional<Duration> flyback =
        slow
            ? fields.need("flyback", "1 ms", this::timeOrNone)
            : Optional.of(fields.or("flyback", Duration.ZERO, this::timeOrNone));
    Duration start = fields.or("frame-start", Duration.ZERO, this::timeOrNone);
    checkStop(fields, "line");
    return Values.all(dwell, flyback)
        ? Optional.of(
            new ModeAbility(
                dwell.get().low(),
                dwell.get().high(),
                field
                    .map(found -> OptionalDouble.of(found.metres()))
                    .orElse(OptionalDouble.empty()),
                flyback.get(),
                start,
                Boundary.LINE))
        : Optional.empty();
  }

  private Optional<ModeAbility> spot(Fields fields) {
    Duration start = fields.or("frame-start", Duration.ZERO, this::timeOrNone);
    checkStop(fields, "slice");
    return fields
        .need("slice", "30 s", node -> quantities.time(node, Sign.POSITIVE))
        .map(
            slice ->
                new ModeAbility(
                    slice.compareTo(SHORTEST_SLICE) < 0 ? slice : SHORTEST_SLICE,
                    slice,
                    OptionalDouble.empty(),
                    Duration.ZERO,
                    start,
                    Boundary.SLICE));
  }

  private Optional<Duration> timeOrNone(Node node) {
    return quantities.time(node, Sign.NOT_NEGATIVE);
  }

  private void checkStop(Fields fields, String boundary) {
    fields.need(
        "stops-at",
        boundary,
        node -> values.choice(node, Map.of(boundary, boundary), List.of(boundary)));
  }
}
