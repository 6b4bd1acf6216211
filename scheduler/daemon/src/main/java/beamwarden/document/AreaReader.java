package beamwarden.document;

import beamwarden.beam.Point;
import beamwarden.beam.Rectangle;
import beamwarden.document.Values.Sign;
import beamwarden.quantity.Dimension;
import beamwarden.quantity.Length;
import beamwarden.queue.Area;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/** Reads outlines, and the named areas of a sample. */
final class AreaReader {
  private static final Keys KEYS =
      Keys.of("an area", "centre", "size", "turn", "keep-out", "sacrificial");
  private static final String EXAMPLE = "{ centre: [120 um, -40 um], size: [60 um, 60 um] }";

  private final Values values;
  private final Problems problems;

  AreaReader(Values values, Problems problems) {
    this.values = values;
    this.problems = problems;
  }

  /** All areas of a sample, those with problems left out. */
  List<Area> read(Node node) {
    List<Area> areas = new ArrayList<>();
    values
        .group(node, "areas: { kept: " + EXAMPLE + " }")
        .ifPresent(
            group -> {
              for (Node.Field area : group.fields()) {
                Optional<String> name = values.id(area.key());
                Optional<Area> read = area(area);
                if (name.isPresent()) {
                  read.ifPresent(areas::add);
                }
              }
            });
    return areas;
  }

  private Optional<Area> area(Node.Field area) {
    Optional<Node.Mapping> group = values.group(area.value(), area.key().text() + ": " + EXAMPLE);
    if (group.isEmpty()) {
      return Optional.empty();
    }
    KEYS.check(group.get(), problems);
    Fields fields = new Fields(group.get(), Optional.empty(), KEYS.of(), problems);
    Optional<Rectangle> outline = rectangle(fields);
    Optional<Area.Use> use = use(fields);
    return outline.isEmpty() || use.isEmpty()
        ? Optional.empty()
        : Optional.of(new Area(area.key().text(), outline.get(), use.get()));
  }

  private Optional<Area.Use> use(Fields fields) {
    boolean keepOut = fields.get("keep-out").flatMap(values::flag).orElse(false);
    boolean sacrificial = fields.get("sacrificial").flatMap(values::flag).orElse(false);
    if (keepOut && sacrificial) {
      problems.error(
          fields.group(), "an area is both keep-out and sacrificial", "leave one of the two out");
      return Optional.empty();
    }
    Area.Use marked = keepOut ? Area.Use.KEEP_OUT : Area.Use.SACRIFICIAL;
    return Optional.of(keepOut || sacrificial ? marked : Area.Use.CAPPED);
  }

  /** The outline that centre, size and turn give. */
  Optional<Rectangle> rectangle(Fields fields) {
    Optional<Point> centre = centre(fields);
    Optional<List<Length>> size = size(fields, "size");
    Optional<Double> turn = turn(fields);
    return centre.isEmpty() || size.isEmpty() || turn.isEmpty()
        ? Optional.empty()
        : Optional.of(
            new Rectangle(
                centre.get(), size.get().get(0).metres(), size.get().get(1).metres(), turn.get()));
  }

  Optional<Point> centre(Fields fields) {
    return fields.need("centre", "[120 um, -40 um]").flatMap(values::point);
  }

  /** Two lengths above zero. */
  Optional<List<Length>> size(Fields fields, String key) {
    return fields
        .need(key, "[60 um, 60 um]")
        .flatMap(node -> values.pair(node, "[60 um, 60 um]"))
        .flatMap(
            pair -> {
              Optional<Length> width = values.length(pair.get(0), Sign.POSITIVE);
              Optional<Length> height = values.length(pair.get(1), Sign.POSITIVE);
              return width.isEmpty() || height.isEmpty()
                  ? Optional.empty()
                  : Optional.of(List.of(width.get(), height.get()));
            });
  }

  /** The turn in degrees; none when nothing is said. */
  Optional<Double> turn(Fields fields) {
    return fields.get("turn").isEmpty()
        ? Optional.of(0.0)
        : fields.get("turn").flatMap(node -> values.number(node, Dimension.ANGLE, Sign.ANY));
  }
}
