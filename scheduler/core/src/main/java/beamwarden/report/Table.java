package beamwarden.report;

import java.util.ArrayList;
import java.util.List;

/**
 * A table of plain text: the first column to the left, the others to the right of their columns.
 *
 * <p>Where the table would be too wide its columns move together; a first cell that would still
 * make it too wide stands on a line of its own, wrapped where it must be.
 */
final class Table {
  private static final String USUAL_GAP = "  ";
  private static final String NARROW_GAP = " ";

  private final List<List<String>> rows = new ArrayList<>();
  private final int columns;

  /** A table with these headings. */
  Table(String... headings) {
    columns = headings.length;
    rows.add(List.of(headings));
  }

  /** Adds a row with as many cells as there are headings. */
  Table row(String... cells) {
    if (cells.length != columns) {
      throw new IllegalArgumentException(
          "a row of " + cells.length + " cells does not fit a table of " + columns + " columns");
    }
    rows.add(List.of(cells));
    return this;
  }

  /** The lines, at most {@code width} wide; none when there is no row. */
  List<String> lines(int width) {
    if (rows.size() == 1) {
      return List.of();
    }
    String gap = width(USUAL_GAP) <= width ? USUAL_GAP : NARROW_GAP;
    int first = Math.max(1, Math.min(widest(0), width - width(gap) + widest(0)));
    List<String> lines = new ArrayList<>();
    rows.forEach(row -> add(lines, row, gap, first, width));
    return lines;
  }

  private void add(List<String> lines, List<String> row, String gap, int first, int width) {
    String head = row.get(0);
    if (head.length() > first) {
      lines.addAll(Page.wrap(head, width));
      head = "";
    }
    StringBuilder line = new StringBuilder(left(head, first));
    for (int column = 1; column < columns; column++) {
      line.append(gap).append(right(row.get(column), widest(column)));
    }
    lines.add(line.toString().stripTrailing());
  }

  /** How wide the table is with a gap between its columns. */
  private int width(String gap) {
    int width = widest(0);
    for (int column = 1; column < columns; column++) {
      width += gap.length() + widest(column);
    }
    return width;
  }

  private int widest(int column) {
    return rows.stream().mapToInt(row -> row.get(column).length()).max().orElse(0);
  }

  private static String left(String text, int width) {
    return text + " ".repeat(Math.max(0, width - text.length()));
  }

  private static String right(String text, int width) {
    return " ".repeat(Math.max(0, width - text.length())) + text;
  }
}
