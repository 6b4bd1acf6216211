package beamwarden.clockwork;

/** The clock could not be started, set or stopped. */
public final class ClockworkException extends RuntimeException {
  private static final long serialVersionUID = 1L;

  ClockworkException(String message, Throwable cause) {
    super(message, cause);
  }
}
