package beamwarden.dose;

import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.stream.LongStream;
import java.util.stream.Stream;

/**
 * Finds where the sum of footprints is highest, over sets of positive area.
 *
 * <p>A sweep over the cells that the edges of the footprints divide the window into: from left to
 * right, with the sum of each row of cells kept up to date. It counts in whole parts of 2^-60 of
 * the total, so that nothing is lost as footprints begin and end; the fluence of the cell it finds
 * is then added up afresh. Time grows as the square of the number of footprints.
 */
final class Highest {
  private static final double WHOLE = 0x1p60;

  private final long[] xs;
  private final long[] ys;
  private final List<Footprint> inside;
  private final List<Box> exempt;

  private Highest(List<Footprint> inside, List<Box> exempt) {
    this.inside = inside;
    this.exempt = exempt;
    List<Box> boxes = Stream.concat(inside.stream().map(Footprint::box), exempt.stream()).toList();
    xs = edges(boxes.stream().flatMapToLong(box -> LongStream.of(box.left(), box.right())));
    ys = edges(boxes.stream().flatMapToLong(box -> LongStream.of(box.bottom(), box.top())));
  }

  /**
   * The highest sum inside a window.
   *
   * @param footprints what is summed, in any order
   * @param window where to look
   * @param exempt where not to look
   * @return the sum and the cell where it is reached, or empty when no footprint covers any area
   */
  static Optional<Footprint> of(List<Footprint> footprints, Box window, List<Box> exempt) {
    List<Footprint> inside =
        footprints.stream()
            .filter(footprint -> footprint.fluence() != 0)
            .flatMap(
                footprint ->
                    footprint.box().common(window).stream()
                        .map(box -> new Footprint(box, footprint.fluence())))
            .toList();
    List<Box> left = exempt.stream().flatMap(box -> box.common(window).stream()).toList();
    return inside.isEmpty() ? Optional.empty() : new Highest(inside, left).sweep();
  }

  /** The sum of the footprints that cover a cell. */
  static double sum(List<Footprint> footprints, Box cell) {
    return footprints.stream()
        .filter(footprint -> footprint.box().contains(cell))
        .mapToDouble(Footprint::fluence)
        .sum();
  }

  private Optional<Footprint> sweep() {
    double total = inside.stream().mapToDouble(Footprint::fluence).sum();
    if (!Double.isFinite(total)) {
      throw new IllegalStateException("a sum of fluences must be a finite number, not " + total);
    }
    List<Edge> edges = edges(total);
    long[] covered = new long[ys.length - 1];
    int[] barred = new int[ys.length - 1];
    long highest = 0;
    Box cell = null;
    int next = 0;
    for (int column = 0; column < xs.length - 1; column++) {
      while (next < edges.size() && edges.get(next).x == xs[column]) {
        edges.get(next++).applyTo(covered, barred);
      }
      for (int row = 0; row < covered.length; row++) {
        if (covered[row] > highest && barred[row] == 0) {
          highest = covered[row];
          cell = new Box(xs[column], ys[row], xs[column + 1], ys[row + 1]);
        }
      }
    }
    return Optional.ofNullable(cell).map(worst -> new Footprint(worst, sum(inside, worst)));
  }

  private List<Edge> edges(double total) {
    Stream<Edge> ofFootprints =
        inside.stream()
            .flatMap(
                footprint ->
                    edges(
                        footprint.box(), (long) Math.ceil(footprint.fluence() / total * WHOLE), 0));
    Stream<Edge> ofExempt = exempt.stream().flatMap(box -> edges(box, 0, 1));
    return Stream.concat(ofFootprints, ofExempt).sorted(Comparator.comparingLong(Edge::x)).toList();
  }

  private Stream<Edge> edges(Box box, long weight, int bar) {
    int from = Arrays.binarySearch(ys, box.bottom());
    int to = Arrays.binarySearch(ys, box.top());
    return Stream.of(
        new Edge(box.left(), from, to, weight, bar),
        new Edge(box.right(), from, to, -weight, -bar));
  }

  private static long[] edges(LongStream coordinates) {
    return coordinates.sorted().distinct().toArray();
  }

  /** Where a box begins or ends as the sweep goes on. */
  private record Edge(long x, int fromRow, int toRow, long weight, int bar) {
    void applyTo(long[] covered, int[] barred) {
      for (int row = fromRow; row < toRow; row++) {
        covered[row] += weight;
        barred[row] += bar;
      }
    }
  }
}
