package beamwarden.document;

import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.document.Values.Sign;
import beamwarden.profile.Profile;
import beamwarden.quantity.Dimension;
import beamwarden.quantity.Length;
import beamwarden.queue.Area;
import beamwarden.queue.Cap;
import beamwarden.queue.Material;
import beamwarden.queue.Sample;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/** Reads samples: what they are made of, where they sit, and what they may receive. */
final class SampleReader {
  private static final Keys KEYS =
      Keys.of("a sample", "id", "label", "material", "placement", "areas", "caps");
  private static final Keys MATERIAL = Keys.of("a material", "formula", "density");
  private static final Keys PLACEMENT =
      Keys.of("a placement", "x", "y", "turn", "uncertainty")
          .notRun(Map.of("fiducials", "write where the sample sits: x, y, turn and uncertainty"));

  private static final String EXAMPLE = "{ id: sst-07, placement: …, caps: … }";
  private static final String MATERIAL_EXAMPLE = "{ formula: SiO2, density: 2.65 g/cm3 }";
  private static final String PLACEMENT_EXAMPLE =
      "{ x: 12.4 mm, y: -3.1 mm, turn: 0 deg, uncertainty: 3 um }";

  private final Values values;
  private final AreaReader areas;
  private final CapReader caps;

  SampleReader(Profile profile, Values values, Problems problems) {
    this.values = values;
    this.areas = new AreaReader(values, problems);
    this.caps = new CapReader(profile, values, problems);
  }

  Optional<Fields> fields(Node node) {
    return values.fields(node, EXAMPLE, KEYS);
  }

  Optional<Sample> read(Fields fields, Optional<String> id) {
    Optional<String> label =
        fields.get("label").map(node -> values.text(node, "polished thin section")).orElse(id);
    Optional<Node> materialNode = fields.get("material");
    Optional<Material> material = materialNode.flatMap(this::material);
    Optional<Placement> placement =
        fields.need("placement", PLACEMENT_EXAMPLE).flatMap(this::placement);
    List<Area> known = fields.get("areas").map(areas::read).orElse(List.of());
    List<Cap> limits = caps.read(fields, known, materialNode.isPresent());
    return id.isEmpty() || placement.isEmpty()
        ? Optional.empty()
        : Optional.of(
            new Sample(id.get(), label.orElse(id.get()), material, placement.get(), known, limits));
  }

  private Optional<Material> material(Node node) {
    Optional<Fields> fields = values.fields(node, "material: " + MATERIAL_EXAMPLE, MATERIAL);
    Optional<String> formula =
        fields
            .flatMap(found -> found.need("formula", "SiO2"))
            .flatMap(found -> values.text(found, "SiO2"));
    Optional<Double> density =
        fields
            .flatMap(found -> found.need("density", "2.65 g/cm3"))
            .flatMap(found -> values.number(found, Dimension.DENSITY, Sign.POSITIVE));
    return formula.isEmpty() || density.isEmpty()
        ? Optional.empty()
        : Optional.of(new Material(formula.get(), density.get()));
  }

  private Optional<Placement> placement(Node node) {
    Optional<Fields> fields = values.fields(node, "placement: " + PLACEMENT_EXAMPLE, PLACEMENT);
    if (fields.isEmpty()) {
      return Optional.empty();
    }
    List<Optional<Length>> lengths = new ArrayList<>();
    lengths.add(fields.get().need("x", "12.4 mm").flatMap(x -> values.length(x, Sign.ANY)));
    lengths.add(fields.get().need("y", "-3.1 mm").flatMap(y -> values.length(y, Sign.ANY)));
    lengths.add(
        fields
            .get()
            .need("uncertainty", "3 um")
            .flatMap(found -> values.length(found, Sign.NOT_NEGATIVE)));
    Optional<Double> turn = areas.turn(fields.get());
    if (turn.isEmpty() || lengths.stream().anyMatch(Optional::isEmpty)) {
      return Optional.empty();
    }
    List<Double> metres = lengths.stream().map(length -> length.orElseThrow().metres()).toList();
    return Optional.of(
        new Placement(new Point(metres.get(0), metres.get(1)), turn.get(), metres.get(2)));
  }
}
