package beamwarden.document;

import beamwarden.document.Values.Sign;
import beamwarden.instrument.Blanker;
import beamwarden.shift.ShiftRule;
import beamwarden.shift.ShiftRule.Closed;
import beamwarden.shift.ShiftRule.Hours;
import beamwarden.shift.ShiftRule.OnDate;
import beamwarden.shift.ShiftRule.Weekly;
import java.time.DateTimeException;
import java.time.DayOfWeek;
import java.time.Duration;
import java.time.LocalDate;
import java.time.LocalTime;
import java.util.ArrayList;
import java.util.EnumSet;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.Set;

/** Reads the rules from which shifts are made. */
final class ShiftsReader {
  private static final Keys OPEN =
      Keys.of(
          "a shift",
          "weekly",
          "date",
          "opens",
          "closes",
          "unattended",
          "wind-down",
          "latest-start",
          "beam-on",
          "closed",
          "because");
  private static final String EXAMPLE =
      "{ weekly: [mon, tue, wed, thu, fri], opens: 19:00, closes: 07:00, unattended: true }";
  private static final Duration DAY = Duration.ofDays(1);

  private final Values values;
  private final Problems problems;
  private final Map<String, DayOfWeek> days = new LinkedHashMap<>();
  private final Map<LocalDate, Node> dates = new HashMap<>();

  ShiftsReader(Values values, Problems problems) {
    this.values = values;
    this.problems = problems;
    for (DayOfWeek day : DayOfWeek.values()) {
      days.put(day.name().substring(0, 3).toLowerCase(Locale.ROOT), day);
    }
  }

  List<ShiftRule> read(Fields profile, Optional<Blanker> blanker, Optional<Duration> windDown) {
    List<ShiftRule> rules = new ArrayList<>();
    Optional<Node.Sequence> list =
        profile
            .need("shifts", "[" + EXAMPLE + "]")
            .flatMap(node -> values.list(node, "[" + EXAMPLE + "]"));
    for (Node node : list.map(Node.Sequence::items).orElse(List.of())) {
      values
          .fields(node, EXAMPLE, OPEN)
          .flatMap(fields -> rule(fields, blanker, windDown))
          .ifPresent(rules::add);
    }
    list.filter(found -> found.items().isEmpty())
        .ifPresent(
            found ->
                problems.error(
                    found, "shifts is empty", "write for example shifts: [" + EXAMPLE + "]"));
    return rules;
  }

  private Optional<ShiftRule> rule(
      Fields fields, Optional<Blanker> blanker, Optional<Duration> windDown) {
    if (fields.has("weekly") == fields.has("date")) {
      problems.error(
          fields.group(),
          fields.has("date") ? "a shift has both weekly and date" : "a shift has no day",
          "write weekly: [mon, tue] or date: 2031-03-08");
      return Optional.empty();
    }
    Optional<LocalDate> date = fields.get("date").flatMap(this::date);
    if (fields.get("closed").flatMap(values::flag).orElse(false)) {
      return closed(fields, date);
    }
    Optional<Hours> hours = hours(fields, blanker, windDown);
    if (fields.has("date")) {
      return date.isEmpty() || hours.isEmpty()
          ? Optional.empty()
          : Optional.of(new OnDate(date.get(), hours.get()));
    }
    Optional<Set<DayOfWeek>> weekly = fields.get("weekly").flatMap(this::weekly);
    return weekly.isEmpty() || hours.isEmpty()
        ? Optional.empty()
        : Optional.of(new Weekly(weekly.get(), hours.get()));
  }

  private Optional<ShiftRule> closed(Fields fields, Optional<LocalDate> date) {
    for (String key : List.of("weekly", "opens", "closes", "unattended")) {
      fields
          .key(key)
          .ifPresent(
              node -> problems.error(node, "a closed day has no " + key, "write date and because"));
    }
    String because =
        fields.get("because").flatMap(node -> values.text(node, "service visit")).orElse("");
    return date.map(found -> new Closed(found, because));
  }

  private Optional<Set<DayOfWeek>> weekly(Node node) {
    Set<DayOfWeek> found = EnumSet.noneOf(DayOfWeek.class);
    Optional<Node.Sequence> list = values.list(node, "[mon, tue]");
    for (Node item : list.map(Node.Sequence::items).orElse(List.of())) {
      values.choice(item, days, List.copyOf(days.keySet())).ifPresent(found::add);
    }
    if (list.isPresent() && list.get().items().isEmpty()) {
      problems.error(node, "weekly is empty", "write for example weekly: [mon, tue]");
    }
    return found.isEmpty() ? Optional.empty() : Optional.of(found);
  }

  private Optional<LocalDate> date(Node node) {
    Optional<LocalDate> date =
        values
            .scalar(node, "2031-03-08")
            .flatMap(
                scalar -> {
                  try {
                    return Optional.of(LocalDate.parse(scalar.text()));
                  } catch (DateTimeException broken) {
                    problems.error(
                        node,
                        Values.written(scalar) + " is no date",
                        "write year, month and day, such as 2031-03-08");
                    return Optional.empty();
                  }
                });
    Node before = date.map(found -> dates.putIfAbsent(found, node)).orElse(null);
    if (before != null) {
      problems.error(
          node,
          "the date " + date.get() + " is given twice, first in line " + before.mark().line(),
          "keep one of the two");
    }
    return date;
  }

  private Optional<Hours> hours(
      Fields fields, Optional<Blanker> blanker, Optional<Duration> usualWindDown) {
    Optional<LocalTime> opens = fields.need("opens", "19:00").flatMap(this::clock);
    Optional<LocalTime> closes = fields.need("closes", "07:00").flatMap(this::clock);
    Optional<Duration> windDown =
        fields.get("wind-down").flatMap(node -> values.time(node, Sign.POSITIVE));
    Optional<LocalTime> latestStart = fields.get("latest-start").flatMap(this::clock);
    Optional<Duration> beamOn =
        fields.get("beam-on").flatMap(node -> values.time(node, Sign.POSITIVE));
    Optional<Node> unattended = fields.get("unattended");
    boolean alone = unattended.flatMap(values::flag).orElse(false);
    if (alone && blanker.isPresent() && blanker.get().alone().isEmpty()) {
      problems.error(
          unattended.get(),
          "nothing turns the beam off without the daemon, so no shift can be unattended",
          "write how quickly the blanker works alone, such as alone: 0.1 ms, or unattended: false");
    }
    if (opens.isEmpty() || closes.isEmpty()) {
      return Optional.empty();
    }
    checkWindDown(fields, opens.get(), closes.get(), windDown.or(() -> usualWindDown));
    return Optional.of(new Hours(opens.get(), closes.get(), alone, windDown, latestStart, beamOn));
  }

  private void checkWindDown(
      Fields fields, LocalTime opens, LocalTime closes, Optional<Duration> windDown) {
    Duration length = Duration.between(opens, closes);
    Duration open = length.isNegative() || length.isZero() ? length.plus(DAY) : length;
    if (windDown.isPresent() && windDown.get().compareTo(open) >= 0) {
      problems.error(
          fields.get("wind-down").orElse(fields.group()),
          "a wind-down of "
              + Printed.time(windDown.get())
              + " leaves nothing of a shift of "
              + Printed.time(open),
          "write a shorter wind-down or a longer shift");
    }
  }

  private Optional<LocalTime> clock(Node node) {
    return values
        .scalar(node, "19:00")
        .flatMap(
            scalar -> {
              try {
                return Optional.of(LocalTime.parse(scalar.text()));
              } catch (DateTimeException broken) {
                problems.error(
                    node,
                    node.name() + " is " + Values.written(scalar) + ", which is no time of day",
                    "write hours and minutes, such as 19:00 or 07:00");
                return Optional.empty();
              }
            });
  }
}
