package beamwarden.instrument;

/** How soon an exposure must end when it is asked to. */
public enum StopWhen {
  /** At the next boundary of its mode: a line, a frame, a slice. */
  AT_BOUNDARY,
  /** At once. */
  NOW
}
