package beamwarden.document;

import beamwarden.document.Problem.Severity;
import java.util.Comparator;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.function.Supplier;
import java.util.stream.Stream;

/** Gathers the problems of one document, each once. Not safe for use by several threads. */
final class Problems {
  private static final Comparator<Problem> BY_PLACE =
      Comparator.comparingInt(Problem::line).thenComparingInt(Problem::column);

  private final String file;
  private final Set<Problem> found = new LinkedHashSet<>();
  private boolean usable = true;
  private int unlisted;

  Problems(String file) {
    this.file = Printed.line(file);
  }

  void error(Node node, String message, String advice) {
    error(node, message, () -> advice);
  }

  /** The advice is worked out only when there is room for the problem. */
  void error(Node node, String message, Supplier<String> advice) {
    add(Severity.ERROR, node.mark(), node.place(), message, advice);
  }

  void warning(Node node, String message, String advice) {
    add(Severity.WARNING, node.mark(), node.place(), message, () -> advice);
  }

  void error(Node.Mark mark, String message, String advice) {
    add(Severity.ERROR, mark, Place.TOP, message, () -> advice);
  }

  /** The value when nothing forbids its use, with all that was found. */
  <T> Reading<T> reading(Optional<T> value) {
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
            usable ? Severity.WARNING : Severity.ERROR,
            file,
            last.line(),
            last.column(),
            "",
            "there are " + unlisted + " more problems",
            "mend those above first");
    return Stream.concat(sorted.stream(), Stream.of(more)).toList();
  }

  private void add(
      Severity severity, Node.Mark mark, Place place, String message, Supplier<String> advice) {
    usable &= severity != Severity.ERROR;
    if (found.size() >= Limits.PROBLEMS) {
      unlisted++;
      return;
    }
    found.add(
        new Problem(
            severity, file, mark.line(), mark.column(), place.toString(), message, advice.get()));
  }
}
