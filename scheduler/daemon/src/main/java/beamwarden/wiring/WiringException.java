package beamwarden.wiring;

/** The parts could not be put together; the message says why, and what to do, in one sentence. */
public class WiringException extends RuntimeException {
  private static final long serialVersionUID = 1L;

  WiringException(String message) {
    super(message);
  }
}
