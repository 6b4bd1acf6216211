package beamwarden.document;

import beamwarden.beam.Mode;
import beamwarden.beam.Mosaic;
import beamwarden.beam.Point;
import beamwarden.beam.Points;
import beamwarden.beam.Rectangle;
import beamwarden.beam.Region;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Stage;
import beamwarden.profile.Profile;
import beamwarden.quantity.Length;
import beamwarden.queue.Sample;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/** Reads regions, and checks them against the scan field and the reach of the stage. */
final class RegionReader {
  private static final Keys RECTANGLE = Keys.of("a rectangle", "centre", "size", "turn");
  private static final Keys MOSAIC =
      Keys.of("a mosaic", "mosaic", "tile", "overlap", "centre", "turn");
  private static final Keys POINTS = Keys.of("a region of points", "points");
  private static final Keys ANY =
      Keys.of("a region", "centre", "size", "turn", "mosaic", "tile", "overlap", "points");
  private static final String RASTER_EXAMPLE = "{ centre: [0 um, 0 um], size: [60 um, 60 um] }";
  private static final String POINTS_EXAMPLE = "[[0 um, 8 um]]";
  private static final String SIZE_EXAMPLE = "[60 um, 60 um]";
  private static final String MOST_OVERLAP = "49 %";

  private final Abilities abilities;
  private final Values values;
  private final Quantities quantities;
  private final Problems problems;

  RegionReader(Profile profile, Values values, Problems problems) {
    this.abilities = profile.abilities();
    this.values = values;
    this.problems = problems;
    this.quantities = new Quantities(values, problems);
  }

  /** The region of a job of that mode on that sample. */
  Optional<Region> read(Fields job, Mode mode, Optional<Sample> sample) {
    boolean points = mode == Mode.PHOTON_CORRELATION;
    String example = points ? "{ points: " + POINTS_EXAMPLE + " }" : RASTER_EXAMPLE;
    Optional<Node.Mapping> group = job.need("region", example, node -> values.group(node, example));
    if (group.isEmpty() || !suits(group.get(), mode, points, example)) {
      return Optional.empty();
    }
    if (points) {
      return points(checked(group.get(), POINTS), sample);
    }
    return ANY.attempted(group.get(), "mosaic") || ANY.attempted(group.get(), "tile")
        ? mosaic(checked(group.get(), MOSAIC), mode, sample)
        : rectangle(checked(group.get(), RECTANGLE), mode, sample);
  }

  /** Whether a region is of the kind that a mode needs. */
  private boolean suits(Node.Mapping group, Mode mode, boolean needsPoints, String example) {
    Optional<Node.Scalar> line = new Fields(group, ANY, problems).key("line");
    boolean hasPoints = ANY.attempted(group, "points");
    if (line.isPresent()) {
      problems.error(
          line.get(), Keys.notRunMessage("a line"), "write a rectangle with one row of pixels");
    } else if (needsPoints != hasPoints) {
      problems.error(
          group,
          mode.text()
              + (needsPoints
                  ? " rests at points, and this region has none"
                  : " scans a raster, and this region has points"),
          "write for example region: " + example);
    }
    return line.isEmpty() && needsPoints == hasPoints;
  }

  private Fields checked(Node.Mapping group, Keys keys) {
    keys.check(group, problems);
    return new Fields(group, keys, problems);
  }

  private Optional<Region> rectangle(Fields fields, Mode mode, Optional<Sample> sample) {
    Optional<Rectangle> rectangle = new AreaReader(values, problems).rectangle(fields);
    rectangle.ifPresent(
        found -> {
          checkField(fields, "size", found, mode);
          checkReach(fields.get("centre").get(), "the centre", found.centre(), sample);
        });
    return rectangle.map(found -> found);
  }

  private Optional<Region> mosaic(Fields fields, Mode mode, Optional<Sample> sample) {
    Optional<List<Integer>> tiles = fields.need("mosaic", "[3, 2]", this::tiles);
    Optional<List<Length>> size = fields.need("tile", SIZE_EXAMPLE, quantities::size);
    Optional<Point> centre = fields.need("centre", "[0 um, 0 um]", quantities::point);
    double overlap = fields.or("overlap", 0.0, node -> quantities.part(node, MOST_OVERLAP));
    double turn = fields.or("turn", 0.0, quantities::turn);
    if (!Values.all(tiles, size, centre)) {
      return Optional.empty();
    }
    Mosaic mosaic =
        new Mosaic(
            tiles.get().get(0),
            tiles.get().get(1),
            size.get().get(0).metres(),
            size.get().get(1).metres(),
            overlap,
            centre.get(),
            turn);
    List<Rectangle> made = mosaic.tiles();
    checkField(fields, "tile", made.get(0), mode);
    made.stream()
        .map(Rectangle::centre)
        .filter(place -> !reached(place, sample))
        .findFirst()
        .ifPresent(place -> checkReach(fields.get("mosaic").get(), "a tile", place, sample));
    return Optional.of(mosaic);
  }

  private Optional<List<Integer>> tiles(Node node) {
    Optional<List<Node>> pair = values.pair(node, "[3, 2]");
    Optional<Long> columns = pair.flatMap(items -> values.whole(items.get(0), 1, Limits.TILES));
    Optional<Long> rows = pair.flatMap(items -> values.whole(items.get(1), 1, Limits.TILES));
    return columns.flatMap(
        width -> rows.map(height -> List.of(width.intValue(), height.intValue())));
  }

  private Optional<Region> points(Fields fields, Optional<Sample> sample) {
    List<Point> places = new ArrayList<>();
    List<Node> items =
        fields.get("points").map(node -> values.items(node, POINTS_EXAMPLE)).orElse(List.of());
    for (Node item : items) {
      Optional<Point> place = quantities.point(item);
      place.ifPresent(found -> checkReach(item, "this point", found, sample));
      place.ifPresent(places::add);
    }
    return places.isEmpty() ? Optional.empty() : Optional.of(new Points(places));
  }

  /** Reports a side of a raster that is longer than the field of the instrument or the mode. */
  private void checkField(Fields fields, String key, Rectangle raster, Mode mode) {
    double largest = abilities.field().largestMetres();
    double ofMode = abilities.modes().get(mode).fieldMetres().orElse(largest);
    Length limit = new Length(Math.min(largest, ofMode));
    List<Node> sides = ((Node.Sequence) fields.get(key).get()).items();
    checkSide(sides.get(0), raster.widthMetres(), limit, mode);
    checkSide(sides.get(1), raster.heightMetres(), limit, mode);
  }

  private void checkSide(Node node, double metres, Length limit, Mode mode) {
    if (metres > limit.metres()) {
      problems.error(
          node,
          node.name()
              + " is "
              + Values.written(node)
              + ", more than the field of "
              + mode.text()
              + " on "
              + abilities.instrument()
              + ", "
              + limit,
          "write at most " + limit + ", or a mosaic of smaller tiles");
    }
  }

  private boolean reached(Point place, Optional<Sample> sample) {
    return sample.map(on -> abilities.stage().reaches(on.placement().toStage(place))).orElse(true);
  }

  private void checkReach(Node node, String what, Point place, Optional<Sample> sample) {
    if (reached(place, sample)) {
      return;
    }
    Point there = sample.orElseThrow().placement().toStage(place);
    Stage stage = abilities.stage();
    problems.error(
        node,
        what
            + " lies at "
            + written(there.xMetres(), there.yMetres())
            + " of the stage, and the stage of "
            + abilities.instrument()
            + " reaches from "
            + written(stage.leftMetres(), stage.bottomMetres())
            + " to "
            + written(stage.rightMetres(), stage.topMetres()),
        "move the region, or correct the sample's placement");
  }

  private static String written(double xMetres, double yMetres) {
    return "[" + new Length(xMetres) + ", " + new Length(yMetres) + "]";
  }
}
