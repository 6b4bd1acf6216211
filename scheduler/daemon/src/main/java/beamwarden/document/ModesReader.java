package beamwarden.document;

import beamwarden.beam.Mode;
import beamwarden.document.Values.Range;
import beamwarden.document.Values.Sign;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.ModeAbility;
import beamwarden.instrument.ModeAbility.Boundary;
import beamwarden.quantity.Dimension;
import java.math.BigDecimal;
import java.time.Duration;
import java.util.ArrayList;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;

/** Reads the modes of a profile; those that this version does not run are left out. */
final class ModesReader {
  static final String EXAMPLE = "{ electron-image: { dwell: [0.1 us, 100 us], stops-at: line } }";

  private static final Keys RASTER =
      Keys.of("a mode", "dwell", "field", "flyback", "frame-start", "stops-at")
          .described("readout");
  private static final Keys SPOT =
      Keys.of("a mode", "slice", "frame-start", "stops-at").described("bin");
  private static final Keys NOT_RUN =
      Keys.of("a mode", "dwell", "integration", "field", "stops-at")
          .described(
              "readout", "bin", "analyser-change", "flyback", "frame-start", "repetition", "slice");
  private static final String DWELL_EXAMPLE = "[0.2 us, 10 ms]";
  private static final Duration SHORTEST_SLICE = Duration.ofSeconds(1);

  private final Values values;
  private final Problems problems;

  ModesReader(Values values, Problems problems) {
    this.values = values;
    this.problems = problems;
  }

  Map<Mode, ModeAbility> read(Node node, Optional<Blanker> blanker) {
    Map<Mode, ModeAbility> modes = new EnumMap<>(Mode.class);
    Optional<Node.Mapping> group = values.group(node, "modes: " + EXAMPLE);
    for (Node.Field field : group.map(Node.Mapping::fields).orElse(List.of())) {
      Optional<Mode> mode = mode(field.key());
      mode.flatMap(known -> ability(known, field.value(), blanker))
          .ifPresent(ability -> modes.put(mode.get(), ability));
    }
    return modes;
  }

  private Optional<Mode> mode(Node.Scalar key) {
    Optional<Mode> mode = Mode.named(key.text());
    if (mode.isEmpty()) {
      List<String> known = new ArrayList<>();
      for (Mode each : Mode.values()) {
        known.add(each.text());
      }
      problems.error(
          key, Printed.quoted(key.text()) + " is no mode", Near.advice(key.text(), known));
    }
    return mode;
  }

  private Optional<ModeAbility> ability(Mode mode, Node node, Optional<Blanker> blanker) {
    return switch (mode) {
      case ELECTRON_IMAGE, INTENSITY_MAP -> raster(node, blanker);
      case PHOTON_CORRELATION -> spot(node);
      case SPECTRAL_MAP, ANGULAR_PATTERN, DECAY_TRACE -> {
        values.fields(node, "{ stops-at: line }", NOT_RUN);
        yield Optional.empty();
      }
    };
  }

  private Optional<ModeAbility> raster(Node node, Optional<Blanker> blanker) {
    Optional<Fields> fields =
        values.fields(node, "{ dwell: " + DWELL_EXAMPLE + ", stops-at: line }", RASTER);
    if (fields.isEmpty()) {
      return Optional.empty();
    }
    Fields found = fields.get();
    Optional<List<Duration>> dwell =
        found.need("dwell", DWELL_EXAMPLE).flatMap(each -> times(each, DWELL_EXAMPLE));
    Optional<Double> field =
        found.get("field").flatMap(each -> values.number(each, Dimension.LENGTH, Sign.POSITIVE));
    boolean slow = blanker.filter(known -> known.kind() == Blanker.Kind.SLOW).isPresent();
    Optional<Duration> flyback =
        slow
            ? found.need("flyback", "1 ms").flatMap(each -> values.time(each, Sign.NOT_NEGATIVE))
            : timeOrZero(found, "flyback");
    Optional<Duration> start = timeOrZero(found, "frame-start");
    boolean stops = stopsAt(found, "line");
    return dwell.isEmpty() || flyback.isEmpty() || start.isEmpty() || !stops
        ? Optional.empty()
        : Optional.of(
            new ModeAbility(
                dwell.get().get(0),
                dwell.get().get(1),
                field.map(OptionalDouble::of).orElse(OptionalDouble.empty()),
                flyback.get(),
                start.get(),
                Boundary.LINE));
  }

  private Optional<ModeAbility> spot(Node node) {
    Optional<Fields> fields = values.fields(node, "{ slice: 30 s, stops-at: slice }", SPOT);
    Optional<Duration> slice =
        fields
            .flatMap(found -> found.need("slice", "30 s"))
            .flatMap(found -> values.time(found, Sign.POSITIVE));
    Optional<Duration> start = fields.flatMap(found -> timeOrZero(found, "frame-start"));
    boolean stops = fields.map(found -> stopsAt(found, "slice")).orElse(false);
    return slice.isEmpty() || start.isEmpty() || !stops
        ? Optional.empty()
        : Optional.of(
            new ModeAbility(
                slice.get().compareTo(SHORTEST_SLICE) < 0 ? slice.get() : SHORTEST_SLICE,
                slice.get(),
                OptionalDouble.empty(),
                Duration.ZERO,
                start.get(),
                Boundary.SLICE));
  }

  private Optional<Duration> timeOrZero(Fields fields, String key) {
    return fields.has(key)
        ? fields.get(key).flatMap(node -> values.time(node, Sign.NOT_NEGATIVE))
        : Optional.of(Duration.ZERO);
  }

  private boolean stopsAt(Fields fields, String boundary) {
    return fields
        .need("stops-at", boundary)
        .flatMap(node -> values.choice(node, Map.of(boundary, true), List.of(boundary)))
        .orElse(false);
  }

  private Optional<List<Duration>> times(Node node, String example) {
    Optional<Range> range = values.range(node, Dimension.TIME, Sign.POSITIVE, example);
    return range.map(found -> List.of(whole(found.low()), whole(found.high())));
  }

  /** Whole nanoseconds; dwells are counted in them. */
  private static Duration whole(BigDecimal seconds) {
    return Duration.ofNanos(seconds.movePointRight(9).longValue());
  }
}
