package beamwarden.shift;

import java.time.DayOfWeek;
import java.time.Duration;
import java.time.LocalDate;
import java.time.LocalTime;
import java.util.Optional;
import java.util.Set;

/** A rule from which shifts are made, in the lab's local time. */
public sealed interface ShiftRule {
  /**
   * The hours of a shift and what may run in it.
   *
   * @param opens when it opens
   * @param closes when it closes; not after {@code opens} means on the next day
   * @param unattended whether nobody is there
   * @param windDown its own wind-down, if any
   * @param latestStart after this local time no exposure starts, if any
   * @param beamOnBudget the longest beam-on time in it, if any
   */
  record Hours(
      LocalTime opens,
      LocalTime closes,
      boolean unattended,
      Optional<Duration> windDown,
      Optional<LocalTime> latestStart,
      Optional<Duration> beamOnBudget) {}

  /**
   * A shift on certain days of every week.
   *
   * @param days the days on which it opens
   * @param hours its hours
   */
  record Weekly(Set<DayOfWeek> days, Hours hours) implements ShiftRule {
    /** Copies the days. */
    public Weekly {
      days = Set.copyOf(days);
    }
  }

  /**
   * A shift on one date, instead of the weekly ones that open on it.
   *
   * @param date the day on which it opens
   * @param hours its hours
   */
  record OnDate(LocalDate date, Hours hours) implements ShiftRule {}

  /**
   * No shift opens on a date.
   *
   * @param date the date
   * @param because why
   */
  record Closed(LocalDate date, String because) implements ShiftRule {}
}
