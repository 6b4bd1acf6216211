package beamwarden.document;

import beamwarden.document.Quantities.Sign;
import beamwarden.instrument.Blanker;
import beamwarden.shift.ShiftCalendar;
import beamwarden.shift.ShiftRule;
import beamwarden.shift.ShiftRule.Closed;
import beamwarden.shift.ShiftRule.Hours;
import beamwarden.shift.ShiftRule.OnDate;
import beamwarden.shift.ShiftRule.Weekly;
import java.time.DayOfWeek;
import java.time.Duration;
import java.time.LocalDate;
import java.time.LocalTime;
import java.time.ZoneOffset;
import java.util.ArrayList;
import java.util.EnumSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.function.Predicate;
import java.util.stream.Stream;

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
  private static final Keys CLOSED = Keys.of("a closed day", "date", "closed", "because");
  private static final String EXAMPLE =
      "{ weekly: [mon, tue, wed, thu, fri], opens: 19:00, closes: 07:00, unattended: true }";
  private static final Map<String, DayOfWeek> DAYS = new LinkedHashMap<>();

  static {
    for (DayOfWeek day : DayOfWeek.values()) {
      DAYS.put(day.name().substring(0, 3).toLowerCase(Locale.ROOT), day);
    }
  }

  private final Optional<Blanker> blanker;
  private final Optional<Duration> windDown;
  private final Values values;
  private final Quantities quantities;
  private final LabTime times;
  private final Problems problems;

  /** Reads shifts of an instrument with that blanker and usual wind-down. */
  ShiftsReader(
      Optional<Blanker> blanker, Optional<Duration> windDown, Values values, Problems problems) {
    this.blanker = blanker;
    this.windDown = windDown;
    this.values = values;
    this.problems = problems;
    this.quantities = new Quantities(values, problems);
    this.times = new LabTime(ZoneOffset.UTC, values, problems);
  }

  List<ShiftRule> read(Fields profile) {
    String example = "[" + EXAMPLE + "]";
    List<Node> items =
        profile
            .need("shifts", example, node -> Optional.of(values.items(node, example)))
            .orElse(List.of());
    List<ShiftRule> rules = new ArrayList<>();
    if (items.size() > Limits.SHIFTS) {
      problems.error(
          items.get(Limits.SHIFTS),
          "there are " + items.size() + " shifts, more than the " + Limits.SHIFTS + " of a profile",
          "leave out those that are over");
      return rules;
    }
    for (Node node : items) {
      Optional<ShiftRule> rule = rule(node);
      rule.filter(found -> agrees(rules, found, node)).ifPresent(rules::add);
    }
    return rules;
  }

  /** Whether a rule can stand beside those before it: the calendar says what contradicts. */
  private boolean agrees(List<ShiftRule> before, ShiftRule rule, Node node) {
    try {
      List<ShiftRule> all = Stream.concat(before.stream(), Stream.of(rule)).toList();
      new ShiftCalendar(ZoneOffset.UTC, all, windDown.orElse(Duration.ZERO));
      return true;
    } catch (IllegalArgumentException contradiction) {
      String[] parts = contradiction.getMessage().split(": ", 2);
      problems.error(node, parts[0], parts.length > 1 ? parts[1] : "change one of the rules");
      return false;
    }
  }

  private Optional<ShiftRule> rule(Node node) {
    Optional<Node.Mapping> group = values.group(node, EXAMPLE);
    if (group.isEmpty()) {
      return Optional.empty();
    }
    Fields any = new Fields(group.get(), OPEN, problems);
    boolean closed =
        any.get("closed")
            .filter(flag -> flag instanceof Node.Scalar text && text.text().equals("true"))
            .isPresent();
    Keys keys = closed ? CLOSED : OPEN;
    keys.check(group.get(), problems);
    Fields fields = new Fields(group.get(), keys, problems);
    return closed ? closed(fields) : open(fields);
  }

  private Optional<ShiftRule> closed(Fields fields) {
    String because = fields.or("because", "", node -> values.text(node, "service visit"));
    return fields.need("date", "2031-03-08", times::date).map(date -> new Closed(date, because));
  }

  private Optional<ShiftRule> open(Fields fields) {
    Optional<Hours> hours = hours(fields);
    fields.get("closed").ifPresent(values::flag);
    if (fields.has("weekly") == fields.has("date")) {
      if (fields.has("date") || !OPEN.attempted(fields.group(), "weekly")) {
        problems.error(
            fields.group(),
            fields.has("date") ? "a shift has both weekly and date" : "a shift has no day",
            "write weekly: [mon, tue] or date: 2031-03-08");
      }
      return Optional.empty();
    }
    if (fields.has("date")) {
      Optional<LocalDate> date = fields.get("date").flatMap(times::date);
      return date.flatMap(day -> hours.map(found -> new OnDate(day, found)));
    }
    Optional<Set<DayOfWeek>> days = fields.get("weekly").flatMap(this::weekly);
    return days.flatMap(found -> hours.map(each -> new Weekly(found, each)));
  }

  private Optional<Set<DayOfWeek>> weekly(Node node) {
    Set<DayOfWeek> days = EnumSet.noneOf(DayOfWeek.class);
    for (Node item : values.items(node, "[mon, tue]")) {
      values.choice(item, DAYS, List.copyOf(DAYS.keySet())).ifPresent(days::add);
    }
    return Optional.of(days).filter(Predicate.not(Set::isEmpty));
  }

  private Optional<Hours> hours(Fields fields) {
    Optional<LocalTime> opens = fields.need("opens", "19:00", times::clock);
    Optional<LocalTime> closes = fields.need("closes", "07:00", times::clock);
    Optional<LocalTime> latestStart = fields.get("latest-start").flatMap(times::clock);
    Optional<Duration> own = time(fields, "wind-down");
    Optional<Duration> beamOn = time(fields, "beam-on");
    boolean unattended = fields.or("unattended", false, values::flag);
    if (unattended && blanker.isPresent() && blanker.get().alone().isEmpty()) {
      problems.error(
          fields.get("unattended").orElse(fields.group()),
          "nothing turns the beam off without the daemon, so that no shift may be unattended",
          "write how quickly the blanker works alone, such as alone: 0.1 ms, or"
              + " unattended: false");
    }
    return Values.all(opens, closes)
        ? Optional.of(new Hours(opens.get(), closes.get(), unattended, own, latestStart, beamOn))
        : Optional.empty();
  }

  private Optional<Duration> time(Fields fields, String key) {
    return fields.get(key).flatMap(node -> quantities.time(node, Sign.POSITIVE));
  }
}
