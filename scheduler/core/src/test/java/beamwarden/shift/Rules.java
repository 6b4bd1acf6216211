package beamwarden.shift;

import beamwarden.shift.ShiftRule.Closed;
import beamwarden.shift.ShiftRule.Hours;
import beamwarden.shift.ShiftRule.OnDate;
import beamwarden.shift.ShiftRule.Weekly;
import java.time.DayOfWeek;
import java.time.Duration;
import java.time.LocalDate;
import java.time.LocalTime;
import java.util.EnumSet;
import java.util.Optional;

/** Short ways to write shift rules in tests. */
final class Rules {
  private Rules() {}

  /** Unattended hours without limits of their own. */
  static Hours hours(String opens, String closes) {
    return new Hours(
        LocalTime.parse(opens),
        LocalTime.parse(closes),
        true,
        Optional.empty(),
        Optional.empty(),
        Optional.empty());
  }

  static Hours withLatestStart(Hours hours, String latest) {
    return new Hours(
        hours.opens(),
        hours.closes(),
        hours.unattended(),
        hours.windDown(),
        Optional.of(LocalTime.parse(latest)),
        hours.beamOnBudget());
  }

  static Hours withWindDown(Hours hours, Duration windDown) {
    return new Hours(
        hours.opens(),
        hours.closes(),
        hours.unattended(),
        Optional.of(windDown),
        hours.latestStart(),
        hours.beamOnBudget());
  }

  static Hours withBudget(Hours hours, Duration budget) {
    return new Hours(
        hours.opens(),
        hours.closes(),
        hours.unattended(),
        hours.windDown(),
        hours.latestStart(),
        Optional.of(budget));
  }

  static ShiftRule daily(Hours hours) {
    return new Weekly(EnumSet.allOf(DayOfWeek.class), hours);
  }

  static ShiftRule weekly(Hours hours, DayOfWeek first, DayOfWeek... more) {
    return new Weekly(EnumSet.of(first, more), hours);
  }

  static ShiftRule on(String date, Hours hours) {
    return new OnDate(LocalDate.parse(date), hours);
  }

  static ShiftRule closed(String date) {
    return new Closed(LocalDate.parse(date), "service visit");
  }
}
