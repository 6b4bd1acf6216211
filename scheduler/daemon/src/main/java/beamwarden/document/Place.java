package beamwarden.document;

import java.util.ArrayDeque;
import java.util.Deque;
import java.util.Optional;

/**
 * The place of a node in the structure of its document, kept as a chain so that many nodes share
 * it.
 *
 * @param parent the place of the node above; empty for the top
 * @param step a key, or the number of an item in brackets
 */
record Place(Optional<Place> parent, String step) {
  /** The top of a document. */
  static final Place TOP = new Place(Optional.empty(), "");

  private static final int LONGEST_CHARACTERS = 200;

  Place key(String key) {
    return new Place(Optional.of(this), Printed.quoted(key));
  }

  Place item(int index) {
    return new Place(Optional.of(this), "[" + index + "]");
  }

  /** The nearest key. */
  String name() {
    return step.startsWith("[") ? parent.map(Place::name).orElse("") : step;
  }

  @Override
  public String toString() {
    Deque<String> steps = new ArrayDeque<>();
    for (Place path = this; path.parent().isPresent(); path = path.parent().get()) {
      steps.push(path.step());
    }
    StringBuilder text = new StringBuilder();
    for (String each : steps) {
      text.append(text.isEmpty() || each.startsWith("[") ? "" : ".").append(each);
    }
    return text.length() > LONGEST_CHARACTERS
        ? text.substring(0, LONGEST_CHARACTERS) + "…"
        : text.toString();
  }
}
