package beamwarden.instrument;

import java.util.Map;

/**
 * An adapter's answer to a seal.
 *
 * @param fence the fencing number below which no grant will ever start again
 * @param store the id of the store to which the adapter is bound
 * @param fates what was done under each grant that was asked about
 */
public record SealReport(long fence, String store, Map<Long, GrantFate> fates) {
  /** Copies the fates. */
  public SealReport {
    fates = Map.copyOf(fates);
  }
}
