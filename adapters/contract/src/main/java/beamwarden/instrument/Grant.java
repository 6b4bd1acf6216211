package beamwarden.instrument;

import beamwarden.beam.Exposure;
import beamwarden.quantity.Current;
import java.time.Duration;

/**
 * Permission to make one exposure, once.
 *
 * <p>Its times run on the adapter's own elapsed time, counted from the arrival of a numbered
 * heartbeat; wall time plays no part.
 *
 * @param number the grant's number, never used twice in one store
 * @param store the id of the store that holds the grant
 * @param fence the fencing number under which it was stored
 * @param session the chamber session for which it is meant
 * @param exposure what to expose, and where
 * @param longestBeamOn the longest time the beam may be on under it, the time to blank included;
 *     times between lines in which a fast blanker keeps it off do not count
 * @param highestCurrent the current above which the exposure must be ended at once
 * @param heartbeat the number of the heartbeat from which {@code latestStart} is counted
 * @param latestStart the time after that heartbeat by which the exposure must have begun
 * @param lease the longest time without a new heartbeat before the beam must be blanked
 * @param chainHead the head of the sample's chain of ledger entries once the grant was stored
 */
public record Grant(
    long number,
    String store,
    long fence,
    String session,
    Exposure exposure,
    Duration longestBeamOn,
    Current highestCurrent,
    long heartbeat,
    Duration latestStart,
    Duration lease,
    String chainHead) {}
