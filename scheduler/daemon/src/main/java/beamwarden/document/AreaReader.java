package beamwarden.document;

import beamwarden.beam.Point;
import beamwarden.beam.Rectangle;
import beamwarden.quantity.Length;
import beamwarden.queue.Area;
import beamwarden.queue.Area.Use;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/** Reads outlines, and the named areas of a sample. */
final class AreaReader {
  private static final Keys KEYS =
      Keys.of("an area", "centre", "size", "turn", "keep-out", "sacrificial");
  private static final String EXAMPLE = "{ centre: [120 um, -40 um], size: [60 um, 60 um] }";

  private final Values values;
  private final Quantities quantities;
  private final Problems problems;

  AreaReader(Values values, Problems problems) {
    this.values = values;
    this.problems = problems;
    this.quantities = new Quantities(values, problems);
  }

  /** All areas of a sample, those with problems left out. */
  List<Area> read(Node node) {
    List<Area> areas = new ArrayList<>();
    Optional<Node.Mapping> group = values.group(node, "{ kept: " + EXAMPLE + " }");
    for (Node.Field field : group.map(Node.Mapping::fields).orElse(List.of())) {
      Optional<String> name = values.id(field.key(), "grain-2");
      Optional<Fields> fields = values.fields(field.value(), EXAMPLE, KEYS);
      Optional<Rectangle> outline = fields.flatMap(this::rectangle);
      Optional<Use> use = fields.map(this::use);
      if (Values.all(name, outline, use)) {
        areas.add(new Area(name.get(), outline.get(), use.get()));
      }
    }
    return areas;
  }

  private Use use(Fields fields) {
    boolean keepOut = fields.or("keep-out", false, values::flag);
    boolean sacrificial = fields.or("sacrificial", false, values::flag);
    if (keepOut && sacrificial) {
      problems.error(
          fields.group(), "an area is both keep-out and sacrificial", "leave one of the two out");
    }
    if (keepOut) {
      return Use.KEEP_OUT;
    }
    return sacrificial ? Use.SACRIFICIAL : Use.CAPPED;
  }

  /** The outline that centre, size and turn give. */
  Optional<Rectangle> rectangle(Fields fields) {
    Optional<Point> centre = fields.need("centre", "[120 um, -40 um]", quantities::point);
    Optional<List<Length>> size = fields.need("size", "[60 um, 60 um]", quantities::size);
    double turn = fields.or("turn", 0.0, quantities::turn);
    return Values.all(centre, size)
        ? Optional.of(
            new Rectangle(
                centre.get(), size.get().get(0).metres(), size.get().get(1).metres(), turn))
        : Optional.empty();
  }
}
