package beamwarden.report;

import java.util.ArrayList;
import java.util.List;
import java.util.regex.Pattern;

/** A page of plain text, no line of it wider than {@link #WIDTH} columns. */
final class Page {
  /** Columns of a page. */
  static final int WIDTH = 80;

  private static final int INDENT = 2;
  private static final Pattern SPACES = Pattern.compile("\\s+");

  private final List<String> lines = new ArrayList<>();

  /** A title with a rule under it. */
  Page title(String text) {
    paragraph(text, 0);
    lines.add("=".repeat(Math.min(WIDTH, longestLine())));
    return this;
  }

  /** An empty line, then a heading. */
  Page heading(String text) {
    lines.add("");
    paragraph(text, 0);
    return this;
  }

  /** A paragraph under a heading. */
  Page text(String text) {
    paragraph(text, INDENT);
    return this;
  }

  /** A paragraph without an indent. */
  Page plain(String text) {
    paragraph(text, 0);
    return this;
  }

  /** A paragraph whose first line begins with a mark, further lines aligned behind it. */
  Page marked(String mark, String text) {
    int indent = INDENT + mark.length() + 2;
    List<String> wrapped = wrap(text, WIDTH - indent);
    for (int i = 0; i < wrapped.size(); i++) {
      String start = i == 0 ? " ".repeat(INDENT) + mark + "  " : " ".repeat(indent);
      lines.add((start + wrapped.get(i)).stripTrailing());
    }
    return this;
  }

  /** A table under a heading; nothing when it has no rows. */
  Page table(Table table) {
    table.lines(WIDTH - INDENT).forEach(line -> lines.add(" ".repeat(INDENT) + line));
    return this;
  }

  /** The page, its last line ended. */
  String print() {
    return String.join("\n", lines) + "\n";
  }

  private int longestLine() {
    return lines.stream().mapToInt(String::length).max().orElse(0);
  }

  private void paragraph(String text, int indent) {
    wrap(text, WIDTH - indent).forEach(line -> lines.add(" ".repeat(indent) + line));
  }

  /** Breaks a text at its spaces, and a word that is wider than a line wherever the line ends. */
  static List<String> wrap(String text, int width) {
    List<String> wrapped = new ArrayList<>();
    StringBuilder line = new StringBuilder();
    for (String word : SPACES.split(text.strip(), -1)) {
      String rest = word;
      if (!line.isEmpty() && line.length() + 1 + rest.length() > width) {
        wrapped.add(line.toString());
        line.setLength(0);
      }
      while (rest.length() > width) {
        wrapped.add(rest.substring(0, width));
        rest = rest.substring(width);
      }
      line.append(line.isEmpty() ? "" : " ").append(rest);
    }
    wrapped.add(line.toString());
    return wrapped;
  }
}
