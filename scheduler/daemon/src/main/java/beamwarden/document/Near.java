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
        .filter(name -> distance(written, name) <= allowed)
        .min(Comparator.comparingInt((String name) -> distance(written, name)));
  }

  /** Advice that names the nearest name, or all of them. */
  static String advice(String written, Collection<String> known) {
    return to(written, known)
        .map(near -> "did you mean " + near + "?")
        .orElseGet(() -> known.isEmpty() ? "there is none" : "write " + Printed.anyOf(known));
  }

  private static int distance(String written, String name) {
    return DISTANCE.apply(written.toLowerCase(Locale.ROOT), name.toLowerCase(Locale.ROOT));
  }
}
