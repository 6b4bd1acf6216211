package beamwarden.command;

import java.time.DateTimeException;
import java.time.Instant;
import java.time.LocalDateTime;
import java.time.OffsetDateTime;
import java.time.ZoneId;
import java.time.zone.ZoneOffsetTransition;

/** Reads moments as people write them. */
final class Moments {
  private Moments() {}

  /**
   * A moment: with an offset as it stands, without one by the lab's clock. A time that the clock
   * skips is the first moment after the gap; of a time that it shows twice it is the earlier one.
   */
  static Instant read(String text, ZoneId zone) {
    try {
      return OffsetDateTime.parse(text).toInstant();
    } catch (DateTimeException withoutOffset) {
      return local(text, zone);
    }
  }

  private static Instant local(String text, ZoneId zone) {
    try {
      LocalDateTime local = LocalDateTime.parse(text);
      ZoneOffsetTransition change = zone.getRules().getTransition(local);
      return change != null && change.isGap()
          ? change.getInstant()
          : local.atZone(zone).withEarlierOffsetAtOverlap().toInstant();
    } catch (DateTimeException none) {
      throw new CommandFailure(
          ExitCode.USAGE,
          text
              + " is no moment; write 2031-03-12T19:00 by the lab's clock, or with an offset such"
              + " as 2031-03-12T18:00Z");
    }
  }
}
