package beamwarden.document;

import beamwarden.document.Problem.Severity;
import java.util.Comparator;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.stream.Stream;

/** Gathers the problems of one document, each once. Not safe for use by several threads. */
final class Problems {
  private static final Comparator<Problem> BY_PLACE =
      Comparator.comparingInt(Problem::line).thenComparingInt(Problem::column);

  private final String file;
  private final Set<Problem> found = new LinkedHashSet<>();
  private int unlisted;

  Problems(String file) {
    this.file = Printed.quoted(file);
  }

  String file() {
    return file;
  }

  void error(Node node, String message, String advice) {
    add(Severity.ERROR, node.mark(), node.path(), message, advice);
  }

  void warning(Node node, String message, String advice) {
    add(Severity.WARNING, node.mark(), node.path(), message, advice);
  }

  void error(Node.Mark mark, String message, String advice) {
    add(Severity.ERROR, mark, Place.TOP, message, advice);
  }

  /** The value when nothing forbids its use, with all that was found. */
  <T> Reading<T> reading(Optional<T> value) {
    boolean usable = found.stream().noneMatch(each -> each.severity() == Severity.ERROR);
    return new Reading<>(usable ? value : Optional.empty(), sorted());
  }

  private List<Problem> sorted() {
    List<Problem> sorted = found.stream().sorted(BY_PLACE).toList();
    if (unlisted == 0) {
      return sorted;
    }
    Problem last = sorted.get(sorted.size() - 1);
    Problem more =
        new Problem(
            Severity.ERROR,
            file,
            last.line(),
            last.column(),
            "",
            "there are " + unlisted + " more problems",
            "mend those above first");
    return Stream.concat(sorted.stream(), Stream.of(more)).toList();
  }

  private void add(Severity severity, Node.Mark mark, Place path, String message, String advice) {
    Problem problem =
        new Problem(severity, file, mark.line(), mark.column(), path.toString(), message, advice);
    if (found.contains(problem)) {
      return;
    }
    if (found.size() < Limits.PROBLEMS) {
      found.add(problem);
    } else {
      unlisted++;
    }
  }
}
