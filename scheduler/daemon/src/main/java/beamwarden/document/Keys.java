package beamwarden.document;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;

/**
 * The keys that a group may have.
 *
 * @param of what the group is, with its article
 * @param used those that this version uses, in the order in which they are named to a person
 * @param notRun those it knows and does not run, each with what to write instead
 * @param described those that only describe and change nothing
 */
record Keys(String of, List<String> used, Map<String, String> notRun, List<String> described) {

  static Keys of(String what, String... used) {
    return new Keys(what, List.of(used), Map.of(), List.of());
  }

  /** The same keys, and some that this version knows and does not run, with what to write. */
  Keys notRun(Map<String, String> keys) {
    return new Keys(of, used, new TreeMap<>(keys), described);
  }

  /** The same keys, and some that only describe. */
  Keys described(String... keys) {
    return new Keys(of, used, notRun, List.of(keys));
  }

  /** Reports every key of a group that is not among these, or that is not run. */
  void check(Node.Mapping group, Problems problems) {
    for (Node.Field field : group.fields()) {
      String key = field.key().text();
      if (notRun.containsKey(key)) {
        problems.error(field.key(), notRunMessage(key), notRun.get(key));
      } else if (!used.contains(key) && !described.contains(key)) {
        unknown(field.key(), problems);
      }
    }
  }

  /** Reports the keys of a group that nobody knows. */
  void checkUnknown(Node.Mapping group, Problems problems) {
    for (Node.Field field : group.fields()) {
      if (!all().contains(field.key().text())) {
        unknown(field.key(), problems);
      }
    }
  }

  static String notRunMessage(String what) {
    return what + " is not run by this version";
  }

  private void unknown(Node.Scalar key, Problems problems) {
    problems.error(
        key,
        Printed.quoted(key.text()) + " is no key of " + of,
        Near.to(key.text(), all())
            .map(near -> "did you mean " + near + "?")
            .orElse("its keys are " + String.join(", ", used)));
  }

  private List<String> all() {
    List<String> all = new ArrayList<>(used);
    all.addAll(notRun.keySet());
    all.addAll(described);
    return all;
  }
}
