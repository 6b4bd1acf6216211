package beamwarden.report;

import beamwarden.shift.Shift;
import beamwarden.shift.ShiftCalendar;
import java.time.Duration;
import java.time.Instant;
import java.time.LocalDate;
import java.time.ZoneId;
import java.util.List;
import java.util.Optional;

/**
 * A night: the local date on which its shifts open, and the time until the next night's first one.
 *
 * <p>What happens between two nights belongs to the one before, so that a morning's report holds
 * it.
 *
 * @param date the local date
 * @param shifts its shifts, at least one
 * @param until when the next night begins; the far future when none is coming
 */
public record Night(LocalDate date, List<Shift> shifts, Instant until) {
  /** How far back the night of a moment is looked for. */
  private static final Duration LOOK_BACK = Duration.ofDays(60);

  /** Copies the shifts. */
  public Night {
    shifts = List.copyOf(shifts);
  }

  /** When its first shift opens. */
  public Instant from() {
    return shifts.get(0).opens();
  }

  /** The night that opens on a date; empty when no shift does. */
  public static Optional<Night> on(LocalDate date, ShiftCalendar calendar, ZoneId zone) {
    Instant midnight = date.atStartOfDay(zone).toInstant();
    List<Shift> ahead =
        calendar
            .from(midnight)
            .filter(shift -> !opensOn(shift, zone).isBefore(date))
            .takeWhile(shift -> opensOn(shift, zone).equals(date))
            .toList();
    if (ahead.isEmpty()) {
      return Optional.empty();
    }
    Instant last = ahead.get(ahead.size() - 1).opens();
    Instant until = calendar.next(last).map(Shift::opens).orElse(Instant.MAX);
    return Optional.of(new Night(date, ahead, until));
  }

  /**
   * The night of a moment: of the last shift that opened until then, or else of the first one to
   * come; empty when there is neither.
   */
  public static Optional<Night> at(Instant moment, ShiftCalendar calendar, ZoneId zone) {
    Optional<Shift> last =
        calendar
            .from(moment.minus(LOOK_BACK))
            .takeWhile(shift -> !shift.opens().isAfter(moment))
            .reduce((earlier, later) -> later);
    return last.or(() -> calendar.next(moment))
        .flatMap(shift -> on(opensOn(shift, zone), calendar, zone));
  }

  /**
   * All nights that meet a stretch of time taken as one, named after the first: for a rehearsal.
   * Empty when no shift meets it.
   */
  public static Optional<Night> spanning(
      Instant from, Instant to, ShiftCalendar calendar, ZoneId zone) {
    List<Shift> met = calendar.from(from).takeWhile(shift -> !shift.opens().isAfter(to)).toList();
    return met.isEmpty()
        ? Optional.empty()
        : Optional.of(new Night(opensOn(met.get(0), zone), met, Instant.MAX));
  }

  private static LocalDate opensOn(Shift shift, ZoneId zone) {
    return shift.opens().atZone(zone).toLocalDate();
  }
}
