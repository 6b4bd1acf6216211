package beamwarden.dose;

import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.quantity.Fluence;
import beamwarden.queue.Area;
import beamwarden.queue.Averaging;
import beamwarden.queue.Cap;
import beamwarden.queue.Sample;
import java.util.Collection;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.stream.Collectors;
import java.util.stream.Stream;

/**
 * How a fluence cap looks at a sample: which value, averaged over what, and where.
 *
 * <p>Sums are made along the axes of one rectangle: a sacrificial area that is near, else the
 * capped area, else the pass itself. What is turned against them counts as the smallest box around
 * it, which never counts too little; where all is turned alike the sum is exact. A sacrificial area
 * that is turned against them is not exempt.
 *
 * @param worth which value
 * @param averages over what width it is averaged
 * @param placement where the sample sits
 * @param inside the area to which it is confined; empty for all of the sample
 * @param exempt the areas that it leaves out
 */
record View(
    Worth worth, Averages averages, Placement placement, Optional<Area> inside, List<Area> exempt) {
  /** How a cap looks at its sample. */
  static View of(Cap.OnFluence cap, Sample sample, Worth worth) {
    Averages averages = Averages.of(cap.averaging(), sample.material());
    Optional<Area> inside = cap.area().map(name -> Ground.area(sample, name));
    return new View(
        worth,
        averages,
        sample.placement(),
        inside,
        inside.isPresent() ? List.of() : Ground.areas(sample, Area.Use.SACRIFICIAL));
  }

  /** How a sample is looked at when nothing is left out. */
  static View everywhere(Averaging averaging, Sample sample, Worth worth) {
    Averages averages = Averages.of(averaging, sample.material());
    return new View(worth, averages, sample.placement(), Optional.empty(), List.of());
  }

  /**
   * The place of the highest sum among those that some passes cover.
   *
   * @param all every pass that is summed; like all passes here, such as left a footprint
   * @param covered the passes that cover the places to look at; among {@code all}
   */
  Optional<Place> highest(List<PassDose> all, Collection<PassDose> covered) {
    Set<List<Object>> seen = new HashSet<>();
    Place highest = null;
    for (PassDose pass : covered) {
      Axes axes = axes(pass);
      for (Box window : outlines(pass, axes)) {
        Optional<Place> found =
            seen.add(List.of(axes, window)) ? highest(all, window, axes) : Optional.empty();
        if (found.isPresent() && (highest == null || found.get().sum() > highest.sum())) {
          highest = found.get();
        }
      }
    }
    return Optional.ofNullable(highest);
  }

  /**
   * The passes in whose places something may have changed when some are asked for: those, and each
   * one they touch along other axes, where they count as the boxes around them.
   */
  List<PassDose> touched(List<PassDose> all, List<PassDose> asked) {
    List<PassDose> somewhere = asked.stream().filter(PassDose::touchesAnything).toList();
    Set<Axes> axesAsked = somewhere.stream().map(this::axes).collect(Collectors.toSet());
    Stream<PassDose> elsewhere =
        all.stream()
            .filter(PassDose::touchesAnything)
            .filter(pass -> !somewhere.contains(pass))
            .filter(pass -> axesAsked.size() > 1 || !axesAsked.contains(axes(pass)))
            .filter(pass -> touches(pass, somewhere));
    return Stream.concat(somewhere.stream(), elsewhere).toList();
  }

  private boolean touches(PassDose pass, List<PassDose> asked) {
    Axes axes = axes(pass);
    Box bounds = pass.bounds(worth, averages, placement, axes);
    return asked.stream()
        .anyMatch(one -> one.bounds(worth, averages, placement, axes).overlaps(bounds));
  }

  private Optional<Place> highest(List<PassDose> all, Box window, Axes axes) {
    Optional<Box> looked =
        inside.isEmpty()
            ? Optional.of(window)
            : window.common(Ground.box(inside.get(), axes).grown(uncertainty()));
    List<Box> left =
        exempt.stream()
            .filter(area -> axes.alongWith(area.outline().turnDegrees()))
            .map(area -> Ground.box(area, axes).shrunk(uncertainty()))
            .toList();
    return looked
        .flatMap(box -> Highest.of(near(all, box, axes), box, left))
        .map(cell -> new Place(cell.fluence(), cell.box(), axes));
  }

  /** What other passes sum to in the middle of a place. */
  double sum(List<PassDose> passes, Place place) {
    Box heart = place.cell().heart();
    return Highest.sum(near(passes, heart, place.axes()), heart);
  }

  /** What is summed at one place, along some axes. */
  double sumAt(List<PassDose> passes, Point at, Axes axes) {
    Box cell = Box.square(at, 0, axes);
    return Highest.sum(near(passes, cell, axes), cell);
  }

  private List<Footprint> near(List<PassDose> passes, Box box, Axes axes) {
    return passes.stream()
        .filter(pass -> pass.bounds(worth, averages, placement, axes).overlaps(box))
        .flatMap(pass -> pass.footprints(worth, averages, placement, axes).stream())
        .toList();
  }

  /** The footprints of a pass that lie in no other one of it. */
  private List<Box> outlines(PassDose pass, Axes axes) {
    List<Box> boxes =
        pass.footprints(worth, averages, placement, axes).stream()
            .map(Footprint::box)
            .distinct()
            .toList();
    return boxes.stream()
        .filter(box -> boxes.stream().noneMatch(other -> !other.equals(box) && other.contains(box)))
        .toList();
  }

  private Axes axes(PassDose pass) {
    Stream<Area> areas =
        Stream.concat(exempt.stream().filter(area -> isNear(pass, area)), inside.stream());
    Stream<Rectangle> frames =
        pass.key().whole() instanceof RasterScan raster
            ? Stream.of(raster.frame())
            : Stream.empty();
    return Stream.concat(areas.map(Area::outline), frames)
        .findFirst()
        .map(outline -> new Axes(outline.turnDegrees()))
        .orElse(Axes.SAMPLE);
  }

  private boolean isNear(PassDose pass, Area area) {
    Axes axes = new Axes(area.outline().turnDegrees());
    return Ground.box(area, axes).overlaps(pass.bounds(worth, averages, placement, axes));
  }

  private double uncertainty() {
    return worth == Worth.UPPER ? placement.uncertaintyMetres() : 0;
  }

  /**
   * A place where a sum is reached.
   *
   * @param sum the sum in e/nm²
   * @param cell a box in which it is the same everywhere
   * @param axes the axes of the box
   */
  record Place(double sum, Box cell, Axes axes) {
    Point at() {
      return axes.out(cell.middle());
    }

    LocalFluence fluence() {
      return new LocalFluence(new Fluence(sum), at());
    }
  }
}
