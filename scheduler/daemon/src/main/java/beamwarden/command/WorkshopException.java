package beamwarden.command;

/** What was asked of a workshop could not be done; the message says why, and what to do. */
public class WorkshopException extends RuntimeException {
  private static final long serialVersionUID = 1L;

  /** With one sentence. */
  public WorkshopException(String message) {
    super(message);
  }

  /** With one sentence and what caused it. */
  public WorkshopException(String message, Throwable cause) {
    super(message, cause);
  }
}
