package beamwarden.dose;

import beamwarden.beam.Point;
import beamwarden.beam.Rectangle;
import java.util.Optional;

/**
 * A rectangle along some {@link Axes}, its edges on a grid of 0.1 nm, so that edges that are meant
 * to coincide do, however their coordinates were computed.
 *
 * @param left its lowest x, in steps of the grid
 * @param bottom its lowest y
 * @param right its highest x
 * @param top its highest y
 */
record Box(long left, long bottom, long right, long top) {
  private static final double GRID_METRES = 1e-10;

  /** Where a coordinate between two steps goes up; no decimal number lies just there. */
  private static final double ROUNDING = 0.6180339887;

  /**
   * The outline of a rectangle, widened along its own axes. Exact for one that lies along the axes,
   * but for the grid; of a turned one it is the smallest box around it, which is never too small.
   */
  static Box around(Rectangle outline, double widenX, double widenY, Axes axes) {
    Point centre = axes.in(outline.centre());
    double halfX = outline.widthMetres() / 2;
    double halfY = outline.heightMetres() / 2;
    if (axes.alongWith(outline.turnDegrees())) {
      return axes.crosswise(outline.turnDegrees())
          ? around(centre, halfY, halfX, widenY, widenX)
          : around(centre, halfX, halfY, widenX, widenY);
    }
    double turn = Math.toRadians(outline.turnDegrees() - axes.turnDegrees());
    double cos = Math.abs(Math.cos(turn));
    double sin = Math.abs(Math.sin(turn));
    double reachX = (halfX + widenX) * cos + (halfY + widenY) * sin;
    double reachY = (halfX + widenX) * sin + (halfY + widenY) * cos;
    return around(centre, 0, 0, reachX, reachY);
  }

  /** A square of that half side about a place on the sample, along the axes. */
  static Box square(Point place, double halfMetres, Axes axes) {
    return around(axes.in(place), 0, 0, halfMetres, halfMetres);
  }

  private static Box around(Point centre, double halfX, double halfY, double moreX, double moreY) {
    return new Box(
        snap(centre.xMetres() - halfX) - steps(moreX),
        snap(centre.yMetres() - halfY) - steps(moreY),
        snap(centre.xMetres() + halfX) + steps(moreX),
        snap(centre.yMetres() + halfY) + steps(moreY));
  }

  private static long snap(double metres) {
    return (long) Math.floor(metres / GRID_METRES + ROUNDING);
  }

  /** A widening in steps: none for zero, else more than the rounding of an edge can take away. */
  private static long steps(double metres) {
    return metres == 0 ? 0 : (long) Math.ceil(metres / GRID_METRES) + 1;
  }

  /** This box, wider by a distance on every side. */
  Box grown(double metres) {
    long by = steps(metres);
    return new Box(left - by, bottom - by, right + by, top + by);
  }

  /** This box, narrower by a distance on every side; it may have no area left. */
  Box shrunk(double metres) {
    long by = steps(metres);
    return new Box(left + by, bottom + by, right - by, top - by);
  }

  /** What both boxes cover, when that has an area. */
  Optional<Box> common(Box other) {
    Box both =
        new Box(
            Math.max(left, other.left),
            Math.max(bottom, other.bottom),
            Math.min(right, other.right),
            Math.min(top, other.top));
    return both.left < both.right && both.bottom < both.top ? Optional.of(both) : Optional.empty();
  }

  /** Whether both cover an area together; a shared edge has none. */
  boolean overlaps(Box other) {
    return left < other.right && other.left < right && bottom < other.top && other.bottom < top;
  }

  /** Whether all of another box lies in this one. */
  boolean contains(Box other) {
    return left <= other.left && bottom <= other.bottom && right >= other.right && top >= other.top;
  }

  /** One step of the grid in its middle. */
  Box heart() {
    long x = Math.floorDiv(left + right, 2);
    long y = Math.floorDiv(bottom + top, 2);
    return new Box(x, y, x + 1, y + 1);
  }

  /** Its middle, in metres along its axes. */
  Point middle() {
    return new Point((left + right) * GRID_METRES / 2, (bottom + top) * GRID_METRES / 2);
  }
}
