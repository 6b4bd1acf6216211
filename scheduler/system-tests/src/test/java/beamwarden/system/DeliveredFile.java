package beamwarden.system;

import beamwarden.beam.Point;
import beamwarden.beam.Rectangle;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import tools.jackson.databind.JsonNode;
import tools.jackson.databind.json.JsonMapper;

/** Reads an instrument's own record, {@code delivered.jsonl}. */
final class DeliveredFile {
  private static final JsonMapper JSON = new JsonMapper();

  private DeliveredFile() {}

  static List<Beam> read(Path file) throws IOException {
    List<Beam> beams = new ArrayList<>();
    for (String line : Files.readAllLines(file)) {
      beams.add(beam(JSON.readTree(line)));
    }
    return beams;
  }

  private static Beam beam(JsonNode line) {
    JsonNode centre = line.get("centre_m");
    JsonNode size = line.get("size_m");
    return new Beam(
        Instant.parse(line.get("began").asString()),
        Instant.parse(line.get("ended").asString()),
        line.get("grant").isNull() ? 0 : line.get("grant").asLong(),
        line.get("sample").asString(),
        line.get("shape").asString().equals("spot"),
        new Rectangle(
            new Point(centre.get(0).asDouble(), centre.get(1).asDouble()),
            size.get(0).asDouble(),
            size.get(1).asDouble(),
            line.get("turn_deg").asDouble()),
        line.get("electrons").asDouble(),
        line.get("current_A").asDouble());
  }
}
