package beamwarden.kit;

/** The promises of {@link beamwarden.instrument.Instrument}, by their numbers there. */
public enum Promise {
  /** No electron reaches a sample except under a grant that was begun. */
  P1("only under a grant"),
  /** Grants are exposed in the order in which they were begun, each at most once. */
  P2("in order, each once"),
  /** That an exposure begins is noted durably before the beam comes on. */
  P3("noted before"),
  /** The beam is blanked when the grant's time is used up. */
  P4("the grant's time"),
  /** An exposure whose current is seen above the grant's is ended at once. */
  P5("the grant's current"),
  /** A stop ends the exposure, and what has not started does not start. */
  P6("the stop"),
  /** Without a heartbeat for the lease, the beam is blanked. */
  P7("the lease"),
  /** A grant that cannot begin in time never begins. */
  P8("the latest start"),
  /** A grant of a lower fence, another store, another session, or before any seal never begins. */
  P9("the fence"),
  /** A seal blanks and forbids, and only then answers. */
  P10("the seal"),
  /** Never begun is said only when that is proved. */
  P11("unknown is not zero"),
  /** A receipt is kept until it is acknowledged. */
  P12("the receipt is kept"),
  /** A receipt is never below what was delivered. */
  P13("the receipt is no smaller"),
  /** Data files are on disk before their receipt is sent. */
  P14("data first"),
  /** Prepared conditions are read back; preparing sends no electron to a sample. */
  P15("read back"),
  /** Closing the adapter, or its process ending in order, blanks the beam. */
  P16("shutdown"),
  /** The chamber session's id outlives the adapter, and does not outlive an opened door. */
  P17("the session"),
  /** Winding down blanks the beam and closes the column valve. */
  P18("wind-down");

  private final String subject;

  Promise(String subject) {
    this.subject = subject;
  }

  /** The promise as messages name it: {@code P7, the lease}. */
  @Override
  public String toString() {
    return name() + ", " + subject;
  }
}
