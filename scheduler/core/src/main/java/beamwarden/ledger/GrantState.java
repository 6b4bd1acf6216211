package beamwarden.ledger;

import java.util.Locale;

/** Where a grant stands. The books count every state but {@link #VOID}. */
public enum GrantState {
  /** Stored, and its receipt is not in yet: counted in full. */
  OPEN,
  /** Its receipt is in: counted as the receipt's upper values say. */
  BOOKED,
  /** Its outcome is not known: counted in full. */
  PRESUMED,
  /** It was never used, and that is proved: not counted. */
  VOID;

  /** The state's name for people. */
  public String text() {
    return name().toLowerCase(Locale.ROOT);
  }
}
