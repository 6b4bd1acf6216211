package beamwarden.document;

import java.util.Collection;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.regex.Pattern;
import java.util.stream.Stream;

/** Reads values without a unit from nodes; what cannot be read is told, and gives nothing. */
final class Values {
  private static final Pattern ID =
      Pattern.compile("[A-Za-z0-9][A-Za-z0-9._-]{0," + (Limits.ID_CHARACTERS - 1) + "}");
  private static final Pattern WHOLE = Pattern.compile("-?[0-9]{1,18}");
  private static final Map<String, Boolean> FLAGS = Map.of("true", true, "false", false);

  private final Problems problems;

  Values(Problems problems) {
    this.problems = problems;
  }

  /** Whether all of these were read. */
  static boolean all(Optional<?>... values) {
    return Stream.of(values).allMatch(Optional::isPresent);
  }

  /** A node's text as it is written, or its kind. */
  static String written(Node node) {
    return node instanceof Node.Scalar scalar && !scalar.empty()
        ? Printed.quoted(scalar.text())
        : node.kind();
  }

  /** One value that is not empty. */
  Optional<Node.Scalar> scalar(Node node, String example) {
    return node instanceof Node.Scalar scalar && !scalar.empty()
        ? Optional.of(scalar)
        : otherKind(node, "one value", example);
  }

  Optional<Node.Sequence> list(Node node, String example) {
    return node instanceof Node.Sequence list
        ? Optional.of(list)
        : otherKind(node, "a list", example);
  }

  /** A list with something in it. */
  List<Node> items(Node node, String example) {
    Optional<Node.Sequence> list = list(node, example);
    if (list.isPresent() && list.get().items().isEmpty()) {
      problems.error(node, node.name() + " is empty", writeForExample(node, example));
    }
    return list.map(Node.Sequence::items).orElse(List.of());
  }

  /** The two items of a list. */
  Optional<List<Node>> pair(Node node, String example) {
    Optional<List<Node>> items = list(node, example).map(Node.Sequence::items);
    if (items.isPresent() && items.get().size() != 2) {
      problems.error(
          node,
          node.name() + " has " + count(items.get().size()) + ", where two are expected",
          writeForExample(node, example));
    }
    return items.filter(found -> found.size() == 2);
  }

  Optional<Node.Mapping> group(Node node, String example) {
    return node instanceof Node.Mapping group
        ? Optional.of(group)
        : otherKind(node, "a group of keys", example);
  }

  /** The values of a group whose keys are checked. */
  Optional<Fields> fields(Node node, String example, Keys keys) {
    Optional<Node.Mapping> group = group(node, example);
    group.ifPresent(found -> keys.check(found, problems));
    return group.map(found -> new Fields(found, keys, problems));
  }

  /** A text in one line, of the allowed length. */
  Optional<String> text(Node node, String example) {
    return scalar(node, example).map(Node.Scalar::text).filter(text -> printable(node, text));
  }

  private boolean printable(Node node, String text) {
    if (text.length() > Limits.TEXT_CHARACTERS) {
      problems.error(
          node,
          node.name() + " has " + text.length() + " characters",
          "write at most " + Limits.TEXT_CHARACTERS);
      return false;
    }
    if (!Printed.line(text).equals(text.strip())) {
      problems.error(
          node,
          node.name() + " holds a line break or another control character",
          "write it in one line");
      return false;
    }
    return true;
  }

  /** A name that may end in a path or an address. */
  Optional<String> id(Node node, String example) {
    return scalar(node, example).map(Node.Scalar::text).filter(text -> safe(node, text, example));
  }

  private boolean safe(Node node, String text, String example) {
    if (ID.matcher(text).matches()) {
      return true;
    }
    problems.error(
        node,
        '"' + Printed.quoted(text) + "\" cannot stand in a path or an address",
        "write at most "
            + Limits.ID_CHARACTERS
            + " letters a-z, digits, - _ and . that begin with a letter or digit, such as "
            + example);
    return false;
  }

  Optional<Boolean> flag(Node node) {
    return choice(node, FLAGS, List.of("true", "false"));
  }

  /** One of some names. */
  <T> Optional<T> choice(Node node, Map<String, T> meanings, List<String> inOrder) {
    Optional<String> text = scalar(node, inOrder.get(0)).map(Node.Scalar::text);
    Optional<T> meant = text.map(meanings::get);
    if (text.isPresent() && meant.isEmpty()) {
      problems.error(
          node,
          node.name() + " cannot be " + Printed.quoted(text.get()),
          () -> Near.advice(text.get(), inOrder));
    }
    return meant;
  }

  /** One of the names that are known; {@code unknown} begins the problem with any other. */
  Optional<String> known(Node node, Collection<String> names, String unknown, String example) {
    Optional<String> text = scalar(node, example).map(Node.Scalar::text);
    if (text.isPresent() && !names.contains(text.get())) {
      problems.error(
          node, unknown + " " + Printed.quoted(text.get()), () -> Near.advice(text.get(), names));
    }
    return text.filter(names::contains);
  }

  /** A whole number from {@code low} to {@code high}. */
  Optional<Long> whole(Node node, long low, long high) {
    Optional<String> text = scalar(node, Long.toString(low)).map(Node.Scalar::text);
    Optional<Long> number =
        text.filter(found -> WHOLE.matcher(found).matches())
            .map(Long::valueOf)
            .filter(found -> low <= found && found <= high);
    if (text.isPresent() && number.isEmpty()) {
      problems.error(
          node,
          node.name() + " is " + Printed.quoted(text.get()),
          "write a whole number from " + low + " to " + high);
    }
    return number;
  }

  private <T> Optional<T> otherKind(Node node, String expected, String example) {
    problems.error(
        node,
        node.name() + " is " + node.kind() + ", where " + expected + " is expected",
        writeForExample(node, example));
    return Optional.empty();
  }

  private static String count(int values) {
    return values == 1 ? "one value" : values + " values";
  }

  /** An example with its key, unless the node is an item of a list. */
  private static String writeForExample(Node node, String example) {
    return "write for example " + (node.place().item() ? "" : node.name() + ": ") + example;
  }
}
