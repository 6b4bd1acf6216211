package beamwarden.shift;

import java.time.Duration;
import java.time.Instant;
import java.time.LocalDate;
import java.time.ZoneId;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;
import java.util.stream.Stream;

/**
 * The shifts of one instrument, as instants, from rules in the lab's local time.
 *
 * <p>Local times become instants by the IANA time zone rules that java.time carries, so that a
 * night across a clock change has its true length:
 *
 * <ul>
 *   <li>A time that the clock skips in spring becomes the first instant after the gap.
 *   <li>A time that it shows twice in autumn is the earlier of the two for an opening and for a
 *       latest start, the later one for a closing. Where the next shift opens before that, the
 *       shift closes when the next one opens.
 *   <li>A shift of which a clock change leaves no more than its wind-down does not open.
 * </ul>
 *
 * <p>A date with a shift of its own has none of the weekly ones, and a closed date has none at all.
 * Both are about shifts that open on the date: one that opened the evening before runs to its end.
 *
 * <p>Immutable, and safe for use by several threads.
 */
public final class ShiftCalendar {
  /** How many days ahead shifts are looked for. */
  public static final int HORIZON_DAYS = 400;

  /** A shift is at most one day long, and a gap at midnight may move its opening by another. */
  private static final int LOOK_BACK_DAYS = 2;

  private final ZoneId zone;
  private final LocalTimes times;
  private final ShiftRules rules;
  private final Duration usualWindDown;

  /**
   * Takes the rules of an instrument.
   *
   * @param zone the lab's time zone
   * @param rules the rules; without any the instrument has no shift
   * @param usualWindDown the wind-down of shifts that name none of their own, zero or more
   * @throws IllegalArgumentException when two shifts overlap, a date is both closed and has a
   *     shift, or a shift leaves nothing to work in
   */
  public ShiftCalendar(ZoneId zone, List<ShiftRule> rules, Duration usualWindDown) {
    this.zone = zone;
    this.times = new LocalTimes(zone);
    this.rules = new ShiftRules(rules, usualWindDown);
    this.usualWindDown = usualWindDown;
  }

  /** The shift that is open at a moment. */
  public Optional<Shift> current(Instant moment) {
    return from(moment).findFirst().filter(shift -> shift.covers(moment));
  }

  /** The first shift that opens after a moment, within {@link #HORIZON_DAYS} days. */
  public Optional<Shift> next(Instant moment) {
    return from(moment).filter(shift -> shift.opens().isAfter(moment)).findFirst();
  }

  /**
   * The shifts that close after a moment, in order: the current one first, then those to come.
   * Lazy, and ends after {@link #HORIZON_DAYS} days.
   */
  public Stream<Shift> from(Instant moment) {
    LocalDate today = moment.atZone(zone).toLocalDate();
    return IntStream.rangeClosed(-LOOK_BACK_DAYS, HORIZON_DAYS)
        .mapToObj(today::plusDays)
        .flatMap(this::on)
        .filter(shift -> shift.closes().isAfter(moment));
  }

  private Stream<Shift> on(LocalDate date) {
    List<LocalShift> today = rules.on(date);
    List<LocalShift> ahead =
        Stream.concat(today.stream(), rules.on(date.plusDays(1)).stream()).toList();
    return IntStream.range(0, today.size())
        .mapToObj(index -> shift(today.get(index), ahead.subList(index + 1, ahead.size())))
        .flatMap(Optional::stream);
  }

  private Optional<Shift> shift(LocalShift local, List<LocalShift> ahead) {
    Instant opens = times.earlier(local.opens());
    Instant closes = closes(local, ahead);
    Duration windDown = local.windDown(usualWindDown);
    if (Duration.between(opens, closes).compareTo(windDown) <= 0) {
      return Optional.empty();
    }
    return Optional.of(
        new Shift(
            opens,
            closes,
            windDown,
            local.hours().unattended(),
            local.latestStart().map(times::earlier),
            local.hours().beamOnBudget()));
  }

  private Instant closes(LocalShift local, List<LocalShift> ahead) {
    Instant closes = times.later(local.closes());
    return ahead.stream()
        .findFirst()
        .map(next -> times.earlier(next.opens()))
        .filter(closes::isAfter)
        .orElse(closes);
  }
}
