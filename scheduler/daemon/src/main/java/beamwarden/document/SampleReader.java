package beamwarden.document;

import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.document.Quantities.Sign;
import beamwarden.physics.Formula;
import beamwarden.profile.Profile;
import beamwarden.quantity.Dimension;
import beamwarden.quantity.Length;
import beamwarden.queue.Area;
import beamwarden.queue.Cap;
import beamwarden.queue.Material;
import beamwarden.queue.Sample;
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
  private final Quantities quantities;
  private final Problems problems;
  private final AreaReader areas;
  private final CapReader caps;

  SampleReader(Profile profile, Values values, Problems problems) {
    this.values = values;
    this.problems = problems;
    this.quantities = new Quantities(values, problems);
    this.areas = new AreaReader(values, problems);
    this.caps = new CapReader(profile, values, problems);
  }

  Optional<Fields> fields(Node node) {
    return values.fields(node, EXAMPLE, KEYS);
  }

  Optional<Sample> read(Fields fields, Optional<String> id) {
    Optional<Node> material = fields.get("material");
    Optional<Placement> placement = fields.need("placement", PLACEMENT_EXAMPLE, this::placement);
    List<Area> known = fields.get("areas").map(areas::read).orElse(List.of());
    List<Cap> limits = caps.read(fields, known, material.isPresent());
    String label =
        fields.or("label", id.orElse(""), node -> values.text(node, "polished thin section"));
    Optional<Material> made = material.flatMap(this::material);
    return Values.all(id, placement)
        ? Optional.of(new Sample(id.get(), label, made, placement.get(), known, limits))
        : Optional.empty();
  }

  private Optional<Material> material(Node node) {
    Optional<Fields> fields = values.fields(node, MATERIAL_EXAMPLE, MATERIAL);
    Optional<String> formula =
        fields.flatMap(found -> found.need("formula", "SiO2", this::formula));
    Optional<Double> density =
        fields.flatMap(
            found ->
                found.need(
                    "density",
                    Dimension.DENSITY.example(),
                    each -> quantities.number(each, Dimension.DENSITY, Sign.POSITIVE)));
    return Values.all(formula, density)
        ? Optional.of(new Material(formula.get(), density.get()))
        : Optional.empty();
  }

  private Optional<String> formula(Node node) {
    Optional<String> text = values.text(node, "SiO2");
    try {
      text.ifPresent(Formula::parse);
      return text;
    } catch (IllegalArgumentException refused) {
      problems.error(
          node, Printed.line(refused.getMessage()), "write a formula such as SiO2 or Ca(OH)2");
      return Optional.empty();
    }
  }

  private Optional<Placement> placement(Node node) {
    Optional<Fields> fields = values.fields(node, PLACEMENT_EXAMPLE, PLACEMENT);
    Optional<Length> x = length(fields, "x", "12.4 mm", Sign.ANY);
    Optional<Length> y = length(fields, "y", "-3.1 mm", Sign.ANY);
    Optional<Length> uncertainty = length(fields, "uncertainty", "3 um", Sign.NOT_NEGATIVE);
    Optional<Double> turn = fields.map(found -> found.or("turn", 0.0, quantities::turn));
    if (!Values.all(x, y, uncertainty, turn)) {
      return Optional.empty();
    }
    Point origin = new Point(x.get().metres(), y.get().metres());
    return Optional.of(new Placement(origin, turn.get(), uncertainty.get().metres()));
  }

  private Optional<Length> length(Optional<Fields> fields, String key, String example, Sign sign) {
    return fields.flatMap(found -> found.need(key, example, node -> quantities.length(node, sign)));
  }
}
