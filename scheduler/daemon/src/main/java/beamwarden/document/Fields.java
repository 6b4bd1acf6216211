package beamwarden.document;

import java.util.Optional;

/**
 * The values of a group by their keys, completed by those of another group where it has none of its
 * own.
 */
final class Fields {
  private final Node.Mapping group;
  private final Optional<Fields> base;
  private final String of;
  private final Problems problems;

  /**
   * The values of a group.
   *
   * @param group the group
   * @param base where a value comes from that the group does not give
   * @param of what the group is, with its article
   * @param problems where a missing value is told
   */
  Fields(Node.Mapping group, Optional<Fields> base, String of, Problems problems) {
    this.group = group;
    this.base = base;
    this.of = of;
    this.problems = problems;
  }

  /** The value of a key, when there is one. */
  Optional<Node> get(String key) {
    return field(key).map(Node.Field::value);
  }

  /** The key itself, when it has a value. */
  Optional<Node.Scalar> key(String key) {
    return field(key).map(Node.Field::key);
  }

  /** Whether the key is written in the group or its base. */
  boolean has(String key) {
    return get(key).isPresent();
  }

  /** The value of a key; a missing one is a problem. */
  Optional<Node> need(String key, String example) {
    Optional<Node> value = get(key);
    if (value.isEmpty()) {
      problems.error(group, of + " needs " + key, "write for example " + key + ": " + example);
    }
    return value;
  }

  Node.Mapping group() {
    return group;
  }

  private Optional<Node.Field> field(String key) {
    return own(key).or(() -> base.flatMap(other -> other.field(key)));
  }

  private Optional<Node.Field> own(String key) {
    return group.fields().stream()
        .filter(field -> field.key().text().equals(key))
        .filter(field -> !(field.value() instanceof Node.Scalar scalar && scalar.empty()))
        .findFirst();
  }
}
