package beamwarden.dose;

/** Whether a receipt can be true. */
public sealed interface Receiving {
  /**
   * It agrees with its grant and with itself.
   *
   * @param delivered what is booked
   */
  record Believed(Delivery delivered) implements Receiving {}

  /**
   * It does not.
   *
   * @param because what contradicts, in one sentence
   * @param atMost the higher of grant and receipt, which stays counted
   */
  record Contradicts(String because, Delivery atMost) implements Receiving {}
}
