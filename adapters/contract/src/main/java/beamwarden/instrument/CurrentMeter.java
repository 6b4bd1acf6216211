package beamwarden.instrument;

import beamwarden.quantity.Current;
import java.time.Duration;

/**
 * How the probe current is known.
 *
 * @param tolerance how far off a reading may be, as a part of it (a guarantee)
 * @param floor how far off a reading may be besides, whatever its size (a guarantee)
 * @param drift how far the current may move after a reading, as a part of it, before the next one
 *     is due (a guarantee; a reading that shows more stops the night)
 * @param readingEvery the longest time between two readings
 * @param readingTakes how long a reading takes
 */
public record CurrentMeter(
    double tolerance, Current floor, double drift, Duration readingEvery, Duration readingTakes) {
  /**
   * The highest current that can flow until the next reading is due: what the larger of the wished
   * and the read current may truly be, grown by the drift.
   */
  public Current highest(Current wished, Current read) {
    double truly = wished.max(read).amperes() * (1 + tolerance) + floor.amperes();
    return new Current(truly * (1 + drift));
  }

  /** What a current that reads so may truly be at most, at the moment of the reading. */
  public Current highestNow(Current read) {
    return new Current(read.amperes() * (1 + tolerance) + floor.amperes());
  }

  /** Whether a reading is so far from the wish that the night must stop. */
  public boolean outOfBounds(Current wished, Current read) {
    double allowed = wished.amperes() * (drift + tolerance) + floor.amperes();
    return Math.abs(read.amperes() - wished.amperes()) > allowed;
  }
}
