package beamwarden.ledger;

/** The books could not be read or written, or do not verify. */
public class JournalException extends RuntimeException {
  private static final long serialVersionUID = 1L;

  /** With one sentence that says what could not be done and what to do. */
  public JournalException(String message) {
    super(message);
  }

  /** With one sentence and what caused it. */
  public JournalException(String message, Throwable cause) {
    super(message, cause);
  }
}
