package beamwarden.queue;

/** What a held job waits for. */
public enum HeldFor {
  /** A person held it; {@code release} lets it go on. */
  A_PERSON,
  /** A cap leaves no room and the job asked to be asked; only {@code approve} lets it go on. */
  APPROVAL,
  /** The chamber was touched; only confirmed placements let it go on. */
  PLACEMENTS,
  /** A job it comes after ended without being done; {@code release} lets it go on all the same. */
  PREDECESSOR
}
