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
  private static final String POINTS_EXAMPLE = "[[0 um, 8 um]]";
  private static final String MOST_OVERLAP = "49 %";

  private final Abilities abilities;
  private final Values values;
  private final Problems problems;
  private final AreaReader areas;

  RegionReader(Profile profile, Values values, Problems problems) {
    this.abilities = profile.abilities();
    this.values = values;
    this.problems = problems;
    this.areas = new AreaReader(values, problems);
  }

  static String example(Mode mode) {
    return mode == Mode.PHOTON_CORRELATION
        ? "{ points: " + POINTS_EXAMPLE + " }"
        : "{ centre: [0 um, 0 um], size: [60 um, 60 um] }";
  }

  /** The region of a job of that mode on that sample, when it fits the field and the stage. */
  Optional<Region> read(Node node, Mode mode, Optional<Sample> sample) {
    Optional<Node.Mapping> group = values.group(node, "region: " + example(mode));
    if (group.isEmpty()) {
      return Optional.empty();
    }
    Fields fields = new Fields(group.get(), Optional.empty(), "a region", problems);
    if (fields.has("line")) {
      problems.error(
          node, Keys.notRunMessage("a line"), "write a rectangle with one row of pixels");
      return Optional.empty();
    }
    boolean points = fields.has("points");
    if (points != (mode == Mode.PHOTON_CORRELATION)) {
      problems.error(
          node,
          points
              ? mode.text() + " does not rest at points"
              : mode.text() + " rests at points and scans no raster",
          "write region: " + example(mode));
      return Optional.empty();
    }
    if (points) {
      return points(fields, sample);
    }
    return fields.has("mosaic") ? mosaic(fields, mode, sample) : rectangle(fields, mode, sample);
  }

  private Optional<Region> rectangle(Fields fields, Mode mode, Optional<Sample> sample) {
    RECTANGLE.check(fields.group(), problems);
    Optional<Rectangle> rectangle = areas.rectangle(fields);
    boolean fits = fitsField(fields, "size", mode);
    rectangle
        .map(Rectangle::centre)
        .ifPresent(
            centre -> checkReach(fields.get("centre").orElseThrow(), "its centre", centre, sample));
    return rectangle.filter(found -> fits).map(found -> found);
  }

  private Optional<Region> mosaic(Fields fields, Mode mode, Optional<Sample> sample) {
    MOSAIC.check(fields.group(), problems);
    Optional<List<Long>> tiles =
        fields
            .get("mosaic")
            .flatMap(node -> values.pair(node, "[3, 2]"))
            .flatMap(
                pair -> {
                  Optional<Long> columns = values.whole(pair.get(0), 1, Limits.TILES);
                  Optional<Long> rows = values.whole(pair.get(1), 1, Limits.TILES);
                  return columns.isEmpty() || rows.isEmpty()
                      ? Optional.empty()
                      : Optional.of(List.of(columns.get(), rows.get()));
                });
    Optional<List<Length>> tile = areas.size(fields, "tile");
    boolean fits = fitsField(fields, "tile", mode);
    Optional<Double> overlap =
        fields.has("overlap")
            ? fields.get("overlap").flatMap(node -> values.part(node, MOST_OVERLAP))
            : Optional.of(0.0);
    Optional<Point> centre = areas.centre(fields);
    Optional<Double> turn = areas.turn(fields);
    if (tiles.isEmpty()
        || tile.isEmpty()
        || overlap.isEmpty()
        || centre.isEmpty()
        || turn.isEmpty()) {
      return Optional.empty();
    }
    Mosaic mosaic =
        new Mosaic(
            tiles.get().get(0).intValue(),
            tiles.get().get(1).intValue(),
            tile.get().get(0).metres(),
            tile.get().get(1).metres(),
            overlap.get(),
            centre.get(),
            turn.get());
    mosaic.tiles().stream()
        .map(Rectangle::centre)
        .filter(place -> !reached(place, sample))
        .findFirst()
        .ifPresent(
            place -> checkReach(fields.get("mosaic").orElseThrow(), "a tile", place, sample));
    return fits ? Optional.of(mosaic) : Optional.empty();
  }

  private Optional<Region> points(Fields fields, Optional<Sample> sample) {
    POINTS.check(fields.group(), problems);
    Optional<Node.Sequence> list =
        fields.get("points").flatMap(node -> values.list(node, POINTS_EXAMPLE));
    if (list.isEmpty()) {
      return Optional.empty();
    }
    List<Point> places = new ArrayList<>();
    for (Node item : list.get().items()) {
      values
          .point(item)
          .ifPresent(
              place -> {
                checkReach(item, "this point", place, sample);
                places.add(place);
              });
    }
    if (list.get().items().isEmpty()) {
      problems.error(list.get(), "points is empty", "write for example points: " + POINTS_EXAMPLE);
    }
    return places.isEmpty() ? Optional.empty() : Optional.of(new Points(places));
  }

  /** Whether both sides are within the field of the instrument and of the mode. */
  private boolean fitsField(Fields fields, String key, Mode mode) {
    double largest = abilities.field().largestMetres();
    double modes = abilities.modes().get(mode).fieldMetres().orElse(largest);
    Length limit = new Length(Math.min(largest, modes));
    boolean fits = true;
    if (fields.get(key).orElse(null) instanceof Node.Sequence sides) {
      for (Node side : sides.items()) {
        fits &= fitsField(side, limit, mode);
      }
    }
    return fits;
  }

  private boolean fitsField(Node side, Length limit, Mode mode) {
    Optional<Length> length = new Values(new Problems("")).length(side, Values.Sign.POSITIVE);
    boolean fits = length.isEmpty() || length.get().compareTo(limit) <= 0;
    if (!fits) {
      problems.error(
          side,
          side.name()
              + " is "
              + Values.written(side)
              + ", more than the field of "
              + mode.text()
              + " on "
              + abilities.instrument()
              + ", "
              + limit,
          "write at most " + limit + ", or a mosaic of smaller tiles");
    }
    return fits;
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
            + " of the stage of "
            + abilities.instrument()
            + ", which reaches from "
            + written(stage.leftMetres(), stage.bottomMetres())
            + " to "
            + written(stage.rightMetres(), stage.topMetres()),
        "move the region, or correct the sample's placement");
  }

  private static String written(double xMetres, double yMetres) {
    return "[" + new Length(xMetres) + ", " + new Length(yMetres) + "]";
  }
}
