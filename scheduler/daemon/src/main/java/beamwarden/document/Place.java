package beamwarden.document;

import java.util.ArrayDeque;
import java.util.Deque;
import java.util.Optional;

/**
 * The place of a node in the structure of its document, kept as a chain so that many nodes share
 * it.
 *
 * @param parent the place of the node above; empty for the top
 * @param key the key as it is written; empty for an item of a list
 * @param index the number of an item of a list, from 0 on; below zero for a key
 */
record Place(Optional<Place> parent, String key, int index) {
  /** The top of a document. */
  static final Place TOP = new Place(Optional.empty(), "", -1);

  private static final int LONGEST_CHARACTERS = 200;

  /** The place of the value of a key. */
  Place key(String written) {
    return new Place(Optional.of(this), written, -1);
  }

  /** The place of an item of a list. */
  Place item(int number) {
    return new Place(Optional.of(this), "", number);
  }

  /** Whether it is an item of a list. */
  boolean item() {
    return index >= 0;
  }

  /** The nearest key, fit to be printed. */
  String name() {
    return item() ? parent.map(Place::name).orElse("") : Printed.quoted(key);
  }

  @Override
  public String toString() {
    Deque<Place> steps = new ArrayDeque<>();
    for (Place place = this; place.parent().isPresent(); place = place.parent().get()) {
      steps.push(place);
    }
    StringBuilder text = new StringBuilder();
    for (Place step : steps) {
      if (step.item()) {
        text.append('[').append(step.index()).append(']');
      } else {
        text.append(text.isEmpty() ? "" : ".").append(Printed.quoted(step.key()));
      }
    }
    return text.length() > LONGEST_CHARACTERS
        ? text.substring(0, LONGEST_CHARACTERS) + "…"
        : text.toString();
  }
}
