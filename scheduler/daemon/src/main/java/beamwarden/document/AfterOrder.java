package beamwarden.document;

import java.util.ArrayDeque;
import java.util.Deque;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;

/** Which job comes after which: unknown names and circles. */
final class AfterOrder {
  private final Map<String, List<Node.Scalar>> afterByJob = new LinkedHashMap<>();
  private final Set<String> settled = new HashSet<>();
  private final Problems problems;

  AfterOrder(Problems problems) {
    this.problems = problems;
  }

  void add(String job, List<Node.Scalar> after) {
    afterByJob.putIfAbsent(job, after);
  }

  /** Reports unknown names, and each circle once at the name that closes it. */
  void check() {
    for (List<Node.Scalar> after : afterByJob.values()) {
      for (Node.Scalar name : after) {
        if (!afterByJob.containsKey(name.text())) {
          problems.error(
              name,
              "after names " + Printed.quoted(name.text()) + ", and this queue has no such job",
              () ->
                  Near.question(name.text(), afterByJob.keySet())
                      .orElse("write the id of a job of this queue"));
        }
      }
    }
    afterByJob.keySet().forEach(this::follow);
  }

  /** Walks along the names without recursion, for a chain may be as long as a queue. */
  private void follow(String start) {
    Deque<Step> way = new ArrayDeque<>();
    Set<String> onWay = new HashSet<>();
    enter(start, way, onWay);
    while (!way.isEmpty()) {
      Step step = way.peek();
      if (step.left().isEmpty()) {
        settled.add(step.job());
        onWay.remove(step.job());
        way.pop();
        continue;
      }
      Node.Scalar next = step.left().pop();
      if (onWay.contains(next.text())) {
        circle(next, step.job());
      } else {
        enter(next.text(), way, onWay);
      }
    }
  }

  private void enter(String job, Deque<Step> way, Set<String> onWay) {
    List<Node.Scalar> after = afterByJob.get(job);
    if (after != null && !settled.contains(job)) {
      onWay.add(job);
      way.push(new Step(job, new ArrayDeque<>(after)));
    }
  }

  private void circle(Node.Scalar name, String job) {
    String what =
        name.text().equals(job)
            ? job + " comes after itself"
            : job + " comes after " + name.text() + ", which comes after " + job + " in turn";
    problems.error(name, what, "leave one of these names out of after");
  }

  /** A job on the way, and the names of its {@code after} that were not yet followed. */
  private record Step(String job, Deque<Node.Scalar> left) {}
}
