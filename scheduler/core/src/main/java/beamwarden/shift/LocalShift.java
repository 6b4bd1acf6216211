package beamwarden.shift;

import beamwarden.shift.ShiftRule.Hours;
import java.time.Duration;
import java.time.LocalDate;
import java.time.LocalDateTime;
import java.time.LocalTime;
import java.time.format.TextStyle;
import java.util.Locale;
import java.util.Optional;

/**
 * A shift as a wall clock shows it, before it is known which instants that means.
 *
 * @param date the day on which it opens
 * @param hours its hours
 */
record LocalShift(LocalDate date, Hours hours) {
  LocalDateTime opens() {
    return date.atTime(hours.opens());
  }

  /** On the next day when the closing time is not after the opening time. */
  LocalDateTime closes() {
    return atOrAfterOpening(hours.closes(), !hours.closes().isAfter(hours.opens()));
  }

  /** On the next day when it is earlier in the day than the opening. */
  Optional<LocalDateTime> latestStart() {
    return hours.latestStart().map(time -> atOrAfterOpening(time, time.isBefore(hours.opens())));
  }

  private LocalDateTime atOrAfterOpening(LocalTime time, boolean onNextDay) {
    return (onNextDay ? date.plusDays(1) : date).atTime(time);
  }

  /** The wind-down: its own, or else the usual one. */
  Duration windDown(Duration usual) {
    return hours.windDown().orElse(usual);
  }

  boolean overlaps(LocalShift other) {
    return opens().isBefore(other.closes()) && other.opens().isBefore(closes());
  }

  /** Refuses hours in which nothing could ever be exposed. */
  void refuseUseless(Duration usualWindDown) {
    Duration length = Duration.between(opens(), closes());
    Duration windDown = windDown(usualWindDown);
    if (windDown.isNegative() || windDown.compareTo(length) >= 0) {
      throw useless("has a wind-down of " + windDown + ": it must be shorter than " + length);
    }
    if (latestStart().filter(latest -> !latest.isBefore(closes())).isPresent()) {
      throw useless("has a latest start of " + hours.latestStart().get() + ": name one within it");
    }
    if (hours.beamOnBudget().filter(budget -> budget.isZero() || budget.isNegative()).isPresent()) {
      throw useless(
          "has a beam-on budget of " + hours.beamOnBudget().get() + ": it must be above zero");
    }
  }

  private IllegalArgumentException useless(String why) {
    return new IllegalArgumentException("the shift " + span() + " " + why);
  }

  /** For messages on a rule of every week: {@code Sat 19:00 to 07:00}. */
  String weeklyText() {
    return date.getDayOfWeek().getDisplayName(TextStyle.SHORT, Locale.ENGLISH) + " " + span();
  }

  /** For messages on one date: {@code 2031-03-08 19:00 to 07:00}. */
  String text() {
    return date + " " + span();
  }

  private String span() {
    return hours.opens() + " to " + hours.closes();
  }
}
