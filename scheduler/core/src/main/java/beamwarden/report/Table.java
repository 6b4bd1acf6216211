package beamwarden.report;

import java.util.ArrayList;
import java.util.List;

/**
 * A table of plain text: the first column to the left, the others to the right of their columns.
 *
 * <p>A first cell that would make the table too wide stands on a line of its own, wrapped where it
 * must be.
 */
final class Table {
  private static final String GAP = "  ";

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
    int others = 0;
    for (int column = 1; column < columns; column++) {
      others += GAP.length() + widest(column);
    }
    int first = Math.max(1, Math.min(widest(0), width - others));
    List<String> lines = new ArrayList<>();
    rows.forEach(row -> add(lines, row, first, width));
    return lines;
  }

  private void add(List<String> lines, List<String> row, int first, int width) {
    String head = row.get(0);
    if (head.length() > first) {
      lines.addAll(Page.wrap(head, width));
      head = "";
    }
    StringBuilder line = new StringBuilder(left(head, first));
    for (int column = 1; column < columns; column++) {
      line.append(GAP).append(right(row.get(column), widest(column)));
    }
    lines.add(line.toString().stripTrailing());
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
