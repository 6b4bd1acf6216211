package beamwarden.dose;

/**
 * What a job is cut to when its caps do not leave room for all of it.
 *
 * @param unitsPerPass how many units of each pass remain, from the first on, at least 1
 * @param passes how many passes remain in all; every tile keeps the same share of them: whole
 *     frames, the first ones, with every filter
 */
public record Trim(long unitsPerPass, int passes) {
  /** Refuses a cut that leaves nothing. */
  public Trim {
    if (unitsPerPass < 1 || passes < 1) {
      throw new IllegalArgumentException(
          "a trimmed job keeps at least one unit of one pass, not "
              + unitsPerPass
              + " of "
              + passes);
    }
  }
}
