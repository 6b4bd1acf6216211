package beamwarden.document;

import java.util.List;
import java.util.Optional;

/**
 * What came of reading a document.
 *
 * @param value what it says; empty when there is a problem that is an error
 * @param problems all its problems, in the order of their places
 * @param <T> what the document describes
 */
public record Reading<T>(Optional<T> value, List<Problem> problems) {
  /** Copies the problems. */
  public Reading {
    problems = List.copyOf(problems);
  }
}
