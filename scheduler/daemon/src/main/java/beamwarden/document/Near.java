package beamwarden.document;

import java.util.Collection;
import java.util.Comparator;
import java.util.Locale;
import java.util.Optional;
import org.apache.commons.text.similarity.DamerauLevenshteinDistance;

/** Finds the name that a misspelt one was meant to be. */
final class Near {
  private static final DamerauLevenshteinDistance DISTANCE = new DamerauLevenshteinDistance();
  private static final int LETTERS_PER_MISTAKE = 3;

  private Near() {}

  /** The known name that differs by the fewest letters, when those are few enough to be a slip. */
  static Optional<String> to(String written, Collection<String> known) {
    if (written.length() > Limits.ID_CHARACTERS) {
      return Optional.empty();
    }
    int allowed = Math.max(1, written.length() / LETTERS_PER_MISTAKE);
    return known.stream()
        .filter(name -> Math.abs(name.length() - written.length()) <= allowed)
        .filter(name -> distance(written, name) <= allowed)
        .min(Comparator.comparingInt((String name) -> distance(written, name)));
  }

  /** A question that names the nearest name, when one is near. */
  static Optional<String> question(String written, Collection<String> known) {
    return to(written, known).map(near -> "did you mean " + near + "?");
  }

  /** The question, or all names there are to choose from. */
  static String advice(String written, Collection<String> known) {
    return question(written, known)
        .orElseGet(() -> known.isEmpty() ? "there is none yet" : "write " + Printed.anyOf(known));
  }

  private static int distance(String written, String name) {
    return DISTANCE.apply(written.toLowerCase(Locale.ROOT), name.toLowerCase(Locale.ROOT));
  }
}
