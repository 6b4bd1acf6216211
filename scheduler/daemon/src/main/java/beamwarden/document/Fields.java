package beamwarden.document;

import java.util.Optional;
import java.util.function.Function;

/**
 * The values of a group by their keys, completed by those of another group where it has none of its
 * own.
 *
 * <p>A value that cannot be read has told so by itself; what takes its place then does not matter,
 * for a document with an error gives no value at all.
 */
final class Fields {
  private final Node.Mapping group;
  private final Optional<Fields> base;
  private final boolean whole;
  private final Keys keys;
  private final Problems problems;

  private Fields(
      Node.Mapping group, Optional<Fields> base, boolean whole, Keys keys, Problems problems) {
    this.group = group;
    this.base = base;
    this.whole = whole;
    this.keys = keys;
    this.problems = problems;
  }

  /** The values of a group whose keys have been checked. */
  Fields(Node.Mapping group, Keys keys, Problems problems) {
    this(group, Optional.empty(), true, keys, problems);
  }

  /**
   * The same values, completed by those of another group; when that one is not known, nothing is
   * told to be missing.
   */
  Fields completedBy(Optional<Fields> other) {
    return new Fields(group, other, other.isPresent(), keys, problems);
  }

  Node.Mapping group() {
    return group;
  }

  /** Whether the key has a value here or in the other group. */
  boolean has(String key) {
    return field(key).isPresent();
  }

  /** The value of a key, when there is one. */
  Optional<Node> get(String key) {
    return field(key).map(Node.Field::value);
  }

  /** The key itself, when it has a value. */
  Optional<Node.Scalar> key(String key) {
    return field(key).map(Node.Field::key);
  }

  /** The value of a key; a missing one is a problem. */
  <T> Optional<T> need(String key, String example, Function<Node, Optional<T>> reader) {
    Optional<Node> value = get(key);
    if (value.isEmpty() && whole && !keys.attempted(group, key)) {
      problems.error(
          group, keys.of() + " needs " + key, "write for example " + key + ": " + example);
    }
    return value.flatMap(reader);
  }

  /** The value of a key, or what is usual when there is none. */
  <T> T or(String key, T usual, Function<Node, Optional<T>> reader) {
    return get(key).flatMap(reader).orElse(usual);
  }

  private Optional<Node.Field> field(String key) {
    return group.fields().stream()
        .filter(field -> field.key().text().equals(key) && !Keys.empty(field))
        .findFirst()
        .or(() -> base.flatMap(other -> other.field(key)));
  }
}
