package beamwarden.shift;

import java.time.Instant;
import java.time.LocalDateTime;
import java.time.ZoneId;
import java.time.ZoneOffset;
import java.time.zone.ZoneOffsetTransition;
import java.time.zone.ZoneRules;
import java.util.List;

/**
 * Which instant a wall clock's time is, clock changes included.
 *
 * <p>A time that the clock skips (in spring) is the first instant after the gap. A time that it
 * shows twice (in autumn) is the earlier or the later one, as the caller wants.
 */
final class LocalTimes {
  private final ZoneRules rules;

  LocalTimes(ZoneId zone) {
    this.rules = zone.getRules();
  }

  /** The first instant at which the clock shows that time, or has passed it. */
  Instant earlier(LocalDateTime local) {
    return instant(local, 0);
  }

  /**
   * The last instant at which the clock shows that time, or the first at which it has passed it.
   */
  Instant later(LocalDateTime local) {
    return instant(local, 1);
  }

  private Instant instant(LocalDateTime local, int whichOfTwo) {
    ZoneOffsetTransition change = rules.getTransition(local);
    if (change != null && change.isGap()) {
      return change.getInstant();
    }
    // One offset on most days, two in an overlap, the earlier instant's first.
    List<ZoneOffset> offsets = rules.getValidOffsets(local);
    return local.toInstant(offsets.get(Math.min(whichOfTwo, offsets.size() - 1)));
  }
}
