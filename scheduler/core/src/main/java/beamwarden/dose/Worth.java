package beamwarden.dose;

/** Which of its two values a dose is taken at. */
enum Worth {
  /** From measured currents, where it was meant to go. */
  BEST,
  /** What was delivered cannot exceed it anywhere while the guarantees hold. */
  UPPER
}
