package beamwarden.document;

import java.util.ArrayList;
import java.util.Collection;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;

/**
 * The keys that a group may have.
 *
 * @param of what the group is, with its article
 * @param used those that this version uses, in the order in which they are named to a person
 * @param notRun those it knows and does not run, each with what to write instead
 * @param accepted those it takes as they are: they only describe, or are judged elsewhere
 */
record Keys(String of, List<String> used, Map<String, String> notRun, List<String> accepted) {

  static Keys of(String what, String... used) {
    return new Keys(what, List.of(used), Map.of(), List.of());
  }

  /** The same keys, and some that this version knows and does not run, with what to write. */
  Keys notRun(Map<String, String> keys) {
    return new Keys(of, used, new TreeMap<>(keys), accepted);
  }

  /** The same keys, and some that are taken as they are. */
  Keys accepting(Collection<String> keys) {
    return new Keys(of, used, notRun, List.copyOf(keys));
  }

  /** Reports every key that the group should not have, and every one without a value. */
  void check(Node.Mapping group, Problems problems) {
    for (Node.Field field : group.fields()) {
      String key = field.key().text();
      if (notRun.containsKey(key)) {
        problems.error(field.key(), notRunMessage(key), notRun.get(key));
      } else if (!used.contains(key) && !accepted.contains(key)) {
        problems.error(
            field.key(),
            Printed.quoted(key) + " is no key of " + of,
            () -> Near.question(key, all()).orElse("its keys are " + String.join(", ", used)));
      } else if (empty(field)) {
        problems.error(field.key(), key + " has no value", "write one, or leave the key out");
      }
    }
  }

  /** Whether a missing key was meant to be there: it has no value, or is misspelt. */
  boolean attempted(Node.Mapping group, String key) {
    return group.fields().stream().anyMatch(field -> attempts(field, key));
  }

  private boolean attempts(Node.Field field, String key) {
    String written = field.key().text();
    return written.equals(key)
        || (!all().contains(written) && Near.to(written, all()).filter(key::equals).isPresent());
  }

  static boolean empty(Node.Field field) {
    return field.value() instanceof Node.Scalar scalar && scalar.empty();
  }

  static String notRunMessage(String what) {
    return what + " is not run by this version";
  }

  private List<String> all() {
    List<String> all = new ArrayList<>(used);
    all.addAll(notRun.keySet());
    all.addAll(accepted);
    return all;
  }
}
