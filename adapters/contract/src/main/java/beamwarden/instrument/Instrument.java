package beamwarden.instrument;

import beamwarden.beam.Conditions;
import beamwarden.beam.Point;
import java.util.Set;

/**
 * One instrument, driven by one daemon at a time.
 *
 * <p>Every verb returns at once; its answer comes later as an {@link InstrumentEvent} to the
 * listener that {@link #connect} was given. No verb waits for the beam.
 *
 * <p>An adapter promises, and the kit tests by these numbers:
 *
 * <ol>
 *   <li><b>P1, only under a grant.</b> No electron reaches a sample except under a grant that was
 *       begun.
 *   <li><b>P2, in order, each once.</b> Grants are exposed in the order in which they were begun,
 *       each at most once, whatever is sent again. One that is sent again after it began is not
 *       answered {@code NotBegun}.
 *   <li><b>P3, noted before.</b> That an exposure begins is noted durably before the beam comes on.
 *   <li><b>P4, the grant's time.</b> The beam is blanked when the grant's {@code longestBeamOn} is
 *       used up; the time to blank lies within it.
 *   <li><b>P5, the grant's current.</b> An exposure whose current is seen above {@code
 *       highestCurrent} is ended at once with {@link FaultKind#CURRENT_OUT_OF_BOUNDS}.
 *   <li><b>P6, the stop.</b> A stop ends the exposure at the next boundary of its mode, or at once;
 *       a grant begun and not yet started does not start, and is answered {@code NotBegun}.
 *   <li><b>P7, the lease.</b> When no heartbeat has come for the grant's lease, the beam is blanked
 *       and the exposure ends; the adapter's own elapsed time counts.
 *   <li><b>P8, the latest start.</b> A grant that cannot begin within {@code latestStart} of its
 *       heartbeat, or whose heartbeat has not been seen since the adapter was connected, never
 *       begins.
 *   <li><b>P9, the fence.</b> A grant with a fencing number below the adapter's fence, of another
 *       store, of another chamber session, or before the first seal since the adapter was
 *       connected, never begins.
 *   <li><b>P10, the seal.</b> On a seal the adapter durably raises its fence, blanks, makes every
 *       grant with a lower number impossible to start, and only then answers. A lower fence, or
 *       another store without an approved hand-over, is refused.
 *   <li><b>P11, unknown is not zero.</b> A seal's answer says of each grant asked about: never
 *       begun, the receipt, or unknown; it says never begun only when that is proved. The numbers
 *       are those of the store that seals; what was done for another store is not an answer.
 *   <li><b>P12, the receipt is kept.</b> A receipt is kept durably until it is acknowledged, and a
 *       later seal that asks for it gets the same one.
 *   <li><b>P13, the receipt is no smaller.</b> A receipt's beam-on time, units touched and highest
 *       current, with the meter's tolerance added, are never below what was delivered.
 *   <li><b>P14, data first.</b> Data files are forced to disk before their receipt is sent.
 *   <li><b>P15, read back.</b> Prepared conditions are read back from the instrument, not echoed.
 *       They are read back once more before each grant begins; one that needs others never begins.
 *       Preparing sends no electron to a sample.
 *   <li><b>P16, shutdown.</b> Closing the adapter, or its process ending in order, blanks the beam.
 *   <li><b>P17, the session.</b> The chamber session's id is the same after an adapter's restart,
 *       and another one after a vent, an opened door or a re-homed stage.
 *   <li><b>P18, wind-down.</b> Winding down blanks the beam and closes the column valve, verified
 *       by read-back.
 * </ol>
 *
 * <p>Which lies a daemon can catch: a receipt with more units than granted, more beam-on time than
 * has passed, less than its units take, a current above the highest granted or away from the
 * meter's reading. A lie that is consistent in all of these needs an independent meter.
 *
 * <p>Verbs may be called from one thread at a time. Events are delivered one at a time.
 */
public interface Instrument extends AutoCloseable {
  /**
   * Connects; answers {@code Connected} or {@code Lost}.
   *
   * <p>May be called again at any time, while connected too: what is told of the instrument's
   * abilities, session and condition is then told afresh. What exposes goes on, and nothing begins
   * before the next seal.
   */
  void connect(InstrumentListener listener);

  /**
   * Raises the fence, blanks, forbids every earlier grant; answers {@code Sealed} or {@code
   * SealRefused}.
   *
   * @param fence the new fencing number, above the adapter's
   * @param store the id of the store that seals
   * @param grants the numbers of the grants about which the store wants to know
   * @param handOver whether a person approved that this store takes over from another one
   */
  void seal(long fence, String store, Set<Long> grants, boolean handOver);

  /**
   * Brings the instrument to conditions and the stage to a place, beam blanked; answers {@code
   * Prepared} or {@code NotPrepared}.
   */
  void prepare(long request, Conditions conditions, Point stage);

  /**
   * Measures the probe current in a cup off every sample; answers {@code Measured} or {@code
   * NotMeasured}. An adapter whose beam would have to cross a sample answers {@code NotMeasured}.
   */
  void measure(long request);

  /** Hands over a grant; answers {@code Begun} or {@code NotBegun}, later {@code Ended}. */
  void begin(Grant grant);

  /** Ends what is exposing, and forbids what was begun and has not started. */
  void stop(StopWhen when);

  /** Renews the lease; answers {@code HeartbeatSeen}. Numbers rise. */
  void heartbeat(long number);

  /** Lets the adapter forget a receipt. */
  void acknowledge(long grant);

  /** Blanks the beam, closes the column valve, then parks; answers {@code WoundDown}. */
  void windDown();

  /** Blanks the beam and lets go of the instrument. */
  @Override
  void close();
}
