package beamwarden.web.api;

import java.util.Locale;
import java.util.Optional;

/** The kinds of refusals; each has a page that explains it, at the address its problems name. */
public enum RefusalKind {
  /** The request makes no sense. */
  MALFORMED(400, "Malformed request", "The request's body, path or query could not be read."),
  /** A change without the token. */
  TOKEN_NEEDED(
      401,
      "Token needed",
      "Every change needs the daemon's token in the header Authorization: Bearer TOKEN. It lies in"
          + " the store's folder, readable by its owner only."),
  /** A page of another site asks. */
  FOREIGN_ORIGIN(
      403,
      "Foreign origin",
      "Requests from pages of other sites are not taken, whatever they ask."),
  /** There is no such thing. */
  NOT_FOUND(
      404, "Not found", "There is nothing at this path, or no job, sample or night so named."),
  /** The path is there, the method is not. */
  METHOD_NOT_ALLOWED(405, "Method not allowed", "The header Allow names the methods of this path."),
  /** What was asked cannot be done as things stand. */
  REFUSED(
      409,
      "Refused",
      "What was asked cannot be done as things stand; the detail says why, and what to do."),
  /** The body is too large. */
  TOO_LARGE(413, "Too large", "The body has more bytes than are read."),
  /** The body's media type is not understood. */
  MEDIA_TYPE(
      415,
      "Media type not understood",
      "A queue is application/yaml or application/json; everything else is application/json."),
  /** The request names another host. */
  WRONG_HOST(
      421,
      "Wrong host",
      "The header Host must be a name of this machine's loopback with the daemon's port."),
  /** A document has problems. */
  DOCUMENT_PROBLEMS(
      422,
      "Document has problems",
      "The queue cannot be used as it is; problems lists what to mend, with line and column."),
  /** Something is broken in the daemon. */
  BROKEN(500, "Something is broken", "The daemon could not answer; its log says more."),
  /** Too much to do, or closing, or stopped for good. */
  UNAVAILABLE(
      503,
      "Unavailable",
      "The daemon is busy, closing, or has stopped for good. Where a change was under way, it is"
          + " not known whether it was made: look before asking again.");

  private static final String FOLDER = "/api/v1/refusals/";

  private final int status;
  private final String title;
  private final String explanation;

  RefusalKind(int status, String title, String explanation) {
    this.status = status;
    this.title = title;
    this.explanation = explanation;
  }

  /** The status code. */
  public int status() {
    return status;
  }

  /** What kind of refusal it is, in a few words. */
  public String title() {
    return title;
  }

  /** The path of its page. */
  public String type() {
    return FOLDER + word();
  }

  String page() {
    return title + "\n\n" + explanation + "\n";
  }

  private String word() {
    return name().toLowerCase(Locale.ROOT).replace('_', '-');
  }

  static Optional<RefusalKind> named(String word) {
    for (RefusalKind kind : values()) {
      if (kind.word().equals(word)) {
        return Optional.of(kind);
      }
    }
    return Optional.empty();
  }
}
