package beamwarden.shift;

import beamwarden.shift.ShiftRule.Closed;
import beamwarden.shift.ShiftRule.Hours;
import beamwarden.shift.ShiftRule.OnDate;
import beamwarden.shift.ShiftRule.Weekly;
import java.time.DayOfWeek;
import java.time.Duration;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.EnumMap;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.function.Function;
import java.util.stream.Stream;

/**
 * Which shifts open on which date, by the wall clock; refuses rules that contradict each other.
 *
 * <p>A date with a rule of its own knows only that rule. A shift lasts at most one day, so that it
 * can only meet shifts of its own day and of the days beside it.
 */
final class ShiftRules {
  /** A week without dates of its own stands for every such week. Begins on a Monday. */
  private static final LocalDate ANY_MONDAY = LocalDate.of(2024, 1, 1);

  private static final int DAYS_OF_WEEK = 7;

  private final Map<DayOfWeek, List<Hours>> weekly = new EnumMap<>(DayOfWeek.class);
  private final Map<LocalDate, List<Hours>> dates = new HashMap<>();
  private final Set<LocalDate> closures = new HashSet<>();

  /**
   * Takes the rules in.
   *
   * @param usualWindDown the wind-down of hours that name none of their own
   * @throws IllegalArgumentException when two shifts overlap, a date is both closed and not, or
   *     hours leave nothing to work in
   */
  ShiftRules(List<ShiftRule> rules, Duration usualWindDown) {
    rules.forEach(this::take);
    closures.forEach(this::takeClosure);
    refuseUselessHours(usualWindDown);
    refuseOverlaps();
  }

  /** The shifts that open on a date, in the order in which they open. */
  List<LocalShift> on(LocalDate date) {
    List<Hours> hours = dates.get(date);
    return hours == null ? onAnyWeek(date) : shifts(date, hours);
  }

  private void take(ShiftRule rule) {
    if (rule instanceof Weekly week) {
      week.days().forEach(day -> add(weekly, day, week.hours()));
    } else if (rule instanceof OnDate single) {
      add(dates, single.date(), single.hours());
    } else if (rule instanceof Closed closed) {
      closures.add(closed.date());
    }
  }

  private static <K> void add(Map<K, List<Hours>> map, K key, Hours hours) {
    map.computeIfAbsent(key, missing -> new ArrayList<>()).add(hours);
  }

  private void takeClosure(LocalDate date) {
    if (dates.put(date, List.of()) != null) {
      throw new IllegalArgumentException(
          date + " is closed and has a shift of its own: take one of the two rules out");
    }
  }

  private List<LocalShift> onAnyWeek(LocalDate date) {
    return shifts(date, weekly.getOrDefault(date.getDayOfWeek(), List.of()));
  }

  private static List<LocalShift> shifts(LocalDate date, List<Hours> hours) {
    return hours.stream()
        .map(each -> new LocalShift(date, each))
        .sorted(Comparator.comparing(LocalShift::opens))
        .toList();
  }

  private void refuseOverlaps() {
    for (int day = 0; day < DAYS_OF_WEEK; day++) {
      LocalDate date = ANY_MONDAY.plusDays(day);
      refuseOverlaps(onAnyWeek(date), onAnyWeek(date.plusDays(1)), LocalShift::weeklyText);
    }
    for (LocalDate date : dates.keySet()) {
      refuseOverlaps(on(date.minusDays(1)), on(date), LocalShift::text);
      refuseOverlaps(on(date), on(date.plusDays(1)), LocalShift::text);
    }
  }

  /** In the order of opening, so that where any two overlap, two neighbours do. */
  private static void refuseOverlaps(
      List<LocalShift> day, List<LocalShift> nextDay, Function<LocalShift, String> text) {
    List<LocalShift> all = Stream.concat(day.stream(), nextDay.stream()).toList();
    for (int next = 1; next < all.size(); next++) {
      LocalShift before = all.get(next - 1);
      LocalShift after = all.get(next);
      if (before.overlaps(after)) {
        throw new IllegalArgumentException(
            "the shifts "
                + text.apply(before)
                + " and "
                + text.apply(after)
                + " overlap: let the first close before the second opens");
      }
    }
  }

  private void refuseUselessHours(Duration usualWindDown) {
    Stream.concat(weekly.values().stream(), dates.values().stream())
        .flatMap(List::stream)
        .forEach(hours -> new LocalShift(ANY_MONDAY, hours).refuseUseless(usualWindDown));
  }
}
