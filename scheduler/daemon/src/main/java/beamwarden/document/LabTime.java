package beamwarden.document;

import java.time.DateTimeException;
import java.time.Instant;
import java.time.LocalDate;
import java.time.LocalDateTime;
import java.time.LocalTime;
import java.time.OffsetDateTime;
import java.time.ZoneId;
import java.time.ZoneOffset;
import java.util.List;
import java.util.Optional;

/** Reads moments, dates and times of day. */
final class LabTime {
  private static final String MOMENT = "2031-03-16T17:00";
  private static final String DATE = "2031-03-08";
  private static final String CLOCK = "19:00";

  private final ZoneId zone;
  private final Values values;
  private final Problems problems;

  /** Reads what is written without an offset in that zone. */
  LabTime(ZoneId zone, Values values, Problems problems) {
    this.zone = zone;
    this.values = values;
    this.problems = problems;
  }

  /** A moment: RFC 3339, or without an offset the lab's own time. */
  Optional<Instant> moment(Node node) {
    Optional<String> text = values.scalar(node, MOMENT).map(scalar -> scalar.text());
    if (text.isEmpty()) {
      return Optional.empty();
    }
    String upper = text.get().replace(' ', 'T');
    try {
      OffsetDateTime moment = OffsetDateTime.parse(upper);
      return Optional.of(moment)
          .filter(at -> inYears(node, at.getYear()))
          .map(at -> at.toInstant());
    } catch (DateTimeException withoutOffset) {
      return local(node, upper);
    }
  }

  private Optional<Instant> local(Node node, String text) {
    try {
      LocalDateTime local = LocalDateTime.parse(text);
      return Optional.of(local)
          .filter(at -> inYears(node, at.getYear()))
          .flatMap(at -> instant(node, at));
    } catch (DateTimeException broken) {
      problems.error(
          node,
          node.name() + " is " + Values.written(node) + ", which is no date with a time",
          "write " + MOMENT + " for the lab's own time, or with its offset " + MOMENT + ":00Z");
      return Optional.empty();
    }
  }

  private Optional<Instant> instant(Node node, LocalDateTime local) {
    List<ZoneOffset> offsets = zone.getRules().getValidOffsets(local);
    if (offsets.size() == 1) {
      return Optional.of(local.toInstant(offsets.get(0)));
    }
    String what = node.name() + " is " + Values.written(node);
    if (offsets.isEmpty()) {
      problems.error(
          node,
          what + ", which no clock shows in " + zone,
          "write a time that is not skipped when the clocks change");
    } else {
      problems.error(
          node,
          what + ", which clocks show twice in " + zone,
          "write which is meant, " + local + offsets.get(0) + " or " + local + offsets.get(1));
    }
    return Optional.empty();
  }

  /** A date. */
  Optional<LocalDate> date(Node node) {
    Optional<Node.Scalar> scalar = values.scalar(node, DATE);
    try {
      return scalar
          .map(found -> LocalDate.parse(found.text()))
          .filter(date -> inYears(node, date.getYear()));
    } catch (DateTimeException broken) {
      problems.error(
          node,
          node.name() + " is " + Values.written(node) + ", which is no date",
          "write year, month and day, such as " + DATE);
      return Optional.empty();
    }
  }

  /** A time of day. */
  Optional<LocalTime> clock(Node node) {
    Optional<Node.Scalar> scalar = values.scalar(node, CLOCK);
    try {
      return scalar.map(found -> LocalTime.parse(found.text()));
    } catch (DateTimeException broken) {
      problems.error(
          node,
          node.name() + " is " + Values.written(node) + ", which is no time of day",
          "write hours and minutes, such as " + CLOCK + " or 07:00");
      return Optional.empty();
    }
  }

  private boolean inYears(Node node, int year) {
    boolean within = year >= Limits.FIRST_YEAR && year <= Limits.LAST_YEAR;
    if (!within) {
      problems.error(
          node,
          node.name() + " is " + Values.written(node),
          "write a year from " + Limits.FIRST_YEAR + " to " + Limits.LAST_YEAR);
    }
    return within;
  }
}
