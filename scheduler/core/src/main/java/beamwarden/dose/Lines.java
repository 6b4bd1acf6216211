package beamwarden.dose;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;

/**
 * Lines of one raster, exposed in one pass without a move of the stage.
 *
 * @param first the first line
 * @param end the line after the last
 * @param best the best value of the mean fluence in e/nm²
 * @param upper the upper value of the mean fluence in e/nm²
 */
record Lines(int first, int end, double best, double upper) {
  /**
   * Joins parts of a pass that follow one another, since between them nothing moved; a join takes
   * the larger fluence. Lines exposed again lie in another layer: they stay parts of their own, and
   * add.
   */
  static List<Lines> joined(List<Lines> parts) {
    List<Lines> joined = new ArrayList<>();
    List<Lines> open = new ArrayList<>();
    for (Lines part : parts.stream().sorted(Comparator.comparingInt(Lines::first)).toList()) {
      Lines before = last(open, part.first);
      open.remove(before);
      if (before != null && before.end < part.first) {
        joined.add(before);
      }
      open.add(before != null && before.end == part.first ? before.and(part) : part);
    }
    joined.addAll(open);
    return List.copyOf(joined);
  }

  /** The last of the layers that end at a line or before; null when all reach beyond it. */
  private static Lines last(List<Lines> layers, int line) {
    return layers.stream()
        .filter(layer -> layer.end <= line)
        .max(Comparator.comparingInt(Lines::end))
        .orElse(null);
  }

  private Lines and(Lines next) {
    return new Lines(first, next.end, Math.max(best, next.best), Math.max(upper, next.upper));
  }
}
