package beamwarden.instrument;

/** What an adapter can prove of a grant when it seals. */
public sealed interface GrantFate {
  /** It never began and never will. */
  record NeverBegun() implements GrantFate {}

  /**
   * It began, and this is what was done.
   *
   * @param receipt the receipt
   */
  record Reported(Receipt receipt) implements GrantFate {}

  /** It may have begun, and the adapter cannot say what was done. Never the same as nothing. */
  record Unknown() implements GrantFate {}
}
