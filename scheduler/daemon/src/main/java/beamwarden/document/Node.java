package beamwarden.document;

import java.util.List;

/** A piece of a document's text that knows where it stands: YAML and JSON give the same. */
sealed interface Node {
  /** Where it begins in the text. */
  Mark mark();

  /** Where it is in the structure. */
  Place place();

  /** What a person calls this kind of node. */
  String kind();

  /** The key under which it stands, the nearest one for an item of a list. */
  default String name() {
    return place().name();
  }

  /**
   * A place in a text.
   *
   * @param line the line, from 1 on
   * @param column the column in characters, from 1 on
   */
  record Mark(int line, int column) {}

  /**
   * One value.
   *
   * @param mark where it begins
   * @param place its place in the structure
   * @param text the value as it is written, quotes undone
   * @param plain whether it was written without quotes
   */
  record Scalar(Mark mark, Place place, String text, boolean plain) implements Node {
    /** Whether nothing was written, or that there is nothing. */
    boolean empty() {
      return plain && (text.isEmpty() || text.equals("~") || text.equals("null"));
    }

    @Override
    public String kind() {
      return empty() ? "empty" : "one value";
    }
  }

  /**
   * A list.
   *
   * @param mark where it begins
   * @param place its place in the structure
   * @param items what is in it
   */
  record Sequence(Mark mark, Place place, List<Node> items) implements Node {
    @Override
    public String kind() {
      return "a list";
    }
  }

  /**
   * A group of keys with their values, each key once.
   *
   * @param mark where it begins
   * @param place its place in the structure
   * @param fields the keys in the order in which they are written
   */
  record Mapping(Mark mark, Place place, List<Field> fields) implements Node {
    @Override
    public String kind() {
      return "a group of keys";
    }
  }

  /**
   * A key and its value.
   *
   * @param key the key
   * @param value its value
   */
  record Field(Scalar key, Node value) {}
}
