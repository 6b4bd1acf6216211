package beamwarden.answer;

import beamwarden.document.Problem;
import com.fasterxml.jackson.annotation.JsonProperty;
import java.util.Locale;

/**
 * Something in a document that a person must or should change.
 *
 * @param severity {@code error} or {@code warning}
 * @param file the document's name
 * @param line the line, from 1 on; 0 when the document could not be read at all
 * @param column the column in characters, from 1 on; 0 likewise
 * @param path the place in the document's structure
 * @param message what is wrong
 * @param advice what to write instead
 */
public record ProblemAnswer(
    @JsonProperty("severity") String severity,
    @JsonProperty("file") String file,
    @JsonProperty("line") int line,
    @JsonProperty("column") int column,
    @JsonProperty("path") String path,
    @JsonProperty("message") String message,
    @JsonProperty("advice") String advice) {
  /** The answer that says the same. */
  public static ProblemAnswer of(Problem problem) {
    return new ProblemAnswer(
        problem.severity().name().toLowerCase(Locale.ROOT),
        problem.file(),
        problem.line(),
        problem.column(),
        problem.path(),
        problem.message(),
        problem.advice());
  }

  /** The problem in one line, beginning with {@code file:line:column}. */
  public String text() {
    return file + ":" + line + ":" + column + ": " + severity + ": " + message + "; " + advice;
  }
}
