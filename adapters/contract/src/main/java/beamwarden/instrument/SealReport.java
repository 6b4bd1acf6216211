package beamwarden.instrument;

import java.util.Map;

/**
 * An adapter's answer to a seal.
 *
 * @param fence the fencing number below which no grant will ever start again
 * @param store the id of the store to which the adapter is bound
 * @param lastBegun the highest number of a grant of that store that ever began here; 0 when none
 *     did. Books that know less are an older copy
 * @param fates what was done under each grant that was asked about
 */
public record SealReport(long fence, String store, long lastBegun, Map<Long, GrantFate> fates) {
  /** Copies the fates. */
  public SealReport {
    fates = Map.copyOf(fates);
  }
}
