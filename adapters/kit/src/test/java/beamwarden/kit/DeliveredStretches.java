package beamwarden.kit;

import beamwarden.quantity.Current;
import beamwarden.simulated.Stretch.Shape;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.time.Instant;
import java.util.List;
import java.util.Locale;
import java.util.OptionalLong;
import tools.jackson.databind.JsonNode;
import tools.jackson.databind.json.JsonMapper;

/** Reads the simulated instrument's own record as the suite wants it. */
final class DeliveredStretches {
  private static final JsonMapper MAPPER = new JsonMapper();

  private final Duration linePeriod;

  /** Of exposures whose lines take so long, flyback included. */
  DeliveredStretches(Duration linePeriod) {
    this.linePeriod = linePeriod;
  }

  /** The stretches of a record in memory. */
  List<Stretch> of(List<beamwarden.simulated.Stretch> delivered) {
    return delivered.stream()
        .map(
            one ->
                stretch(
                    one.grant(),
                    one.began(),
                    one.ended(),
                    one.electrons(),
                    one.currentAmperes(),
                    one.shape()))
        .toList();
  }

  /** The stretches of a file {@code delivered.jsonl}; none when it is not there yet. */
  List<Stretch> in(Path file) {
    try {
      return Files.exists(file)
          ? Files.readAllLines(file).stream().map(this::line).toList()
          : List.of();
    } catch (IOException e) {
      throw new UncheckedIOException("cannot read " + file, e);
    }
  }

  private Stretch line(String json) {
    JsonNode line = MAPPER.readTree(json);
    JsonNode grant = line.get("grant");
    return stretch(
        grant.isNull() ? OptionalLong.empty() : OptionalLong.of(grant.longValue()),
        Instant.parse(line.get("began").stringValue()),
        Instant.parse(line.get("ended").stringValue()),
        line.get("electrons").doubleValue(),
        line.get("current_A").doubleValue(),
        Shape.valueOf(line.get("shape").stringValue().toUpperCase(Locale.ROOT)));
  }

  private Stretch stretch(
      OptionalLong grant,
      Instant began,
      Instant ended,
      double electrons,
      double amperes,
      Shape shape) {
    Duration time = Duration.between(began, ended);
    return new Stretch(grant, began, ended, electrons, new Current(amperes), units(shape, time));
  }

  /** Nanoseconds of a spot, lines of a rectangle; a part of a line counts as one. */
  private OptionalLong units(Shape shape, Duration time) {
    long line = linePeriod.toNanos();
    return switch (shape) {
      case SPOT -> OptionalLong.of(time.toNanos());
      case RECTANGLE -> OptionalLong.of((time.toNanos() + line - 1) / line);
      case STRIP -> OptionalLong.empty();
    };
  }
}
