package beamwarden.web;

/** The web server could not be started; the message says why, and what to do. */
public class WebException extends RuntimeException {
  private static final long serialVersionUID = 1L;

  WebException(String message, Throwable cause) {
    super(message, cause);
  }
}
