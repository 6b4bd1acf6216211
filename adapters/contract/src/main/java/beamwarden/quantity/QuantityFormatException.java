package beamwarden.quantity;

/** A text that was meant to be a quantity and is not one of the expected dimension. */
public final class QuantityFormatException extends IllegalArgumentException {
  private final String reason;
  private final String advice;

  QuantityFormatException(String reason, String advice) {
    super(reason + "; " + advice);
    this.reason = reason;
    this.advice = advice;
  }

  /** What is wrong with it, with the text itself. */
  public String reason() {
    return reason;
  }

  /** What to write instead. */
  public String advice() {
    return advice;
  }
}
