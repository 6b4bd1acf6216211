package beamwarden.document;

/**
 * Something in a document that a person must or should change.
 *
 * @param severity whether the document can be used as it is
 * @param file the document's name
 * @param line the line, from 1 on; 0 when the document could not be read at all
 * @param column the column in characters, from 1 on; 0 when the document could not be read at all
 * @param path the place in the document's structure, such as {@code jobs[2].region.size}
 * @param message what is wrong, with the value and the limit
 * @param advice what to write instead
 */
public record Problem(
    Severity severity,
    String file,
    int line,
    int column,
    String path,
    String message,
    String advice) {

  /** How much a problem matters. */
  public enum Severity {
    /** The document cannot be used. */
    ERROR,
    /** The document can be used; something in it has no effect. */
    WARNING
  }

  /** The problem in one line, beginning with {@code file:line:column}. */
  public String text() {
    String kind = severity == Severity.ERROR ? "error" : "warning";
    return file + ":" + line + ":" + column + ": " + kind + ": " + message + "; " + advice;
  }
}
