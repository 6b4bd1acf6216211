package beamwarden.document;

import java.time.DateTimeException;
import java.time.Instant;
import java.time.LocalDateTime;
import java.time.OffsetDateTime;
import java.time.ZoneId;
import java.time.ZoneOffset;
import java.util.List;
import java.util.Optional;

/** Reads moments: RFC 3339, or without an offset the lab's own time. */
final class LabTime {
  private static final String EXAMPLE = "2031-03-16T17:00";

  private final ZoneId zone;
  private final Values values;
  private final Problems problems;

  LabTime(ZoneId zone, Values values, Problems problems) {
    this.zone = zone;
    this.values = values;
    this.problems = problems;
  }

  Optional<Instant> moment(Node node) {
    return values.scalar(node, EXAMPLE).flatMap(scalar -> moment(node, scalar.text()));
  }

  private Optional<Instant> moment(Node node, String text) {
    try {
      return Optional.of(OffsetDateTime.parse(text.replace(' ', 'T')).toInstant());
    } catch (DateTimeException withoutOffset) {
      return local(node, text);
    }
  }

  private Optional<Instant> local(Node node, String text) {
    LocalDateTime local;
    try {
      local = LocalDateTime.parse(text.replace(' ', 'T'));
    } catch (DateTimeException broken) {
      problems.error(
          node,
          node.name() + " is " + Printed.quoted(text) + ", which is no date with a time",
          "write for example " + EXAMPLE + " for the lab's own time, or " + EXAMPLE + ":00Z");
      return Optional.empty();
    }
    List<ZoneOffset> offsets = zone.getRules().getValidOffsets(local);
    if (offsets.size() == 1) {
      return Optional.of(local.toInstant(offsets.get(0)));
    }
    problems.error(
        node,
        node.name()
            + " is "
            + Printed.quoted(text)
            + (offsets.isEmpty() ? ", which no clock shows in " : ", which clocks show twice in ")
            + zone,
        offsets.isEmpty()
            ? "write a time that is not skipped when the clocks change"
            : "write which one is meant: "
                + local
                + offsets.get(0)
                + " or "
                + local
                + offsets.get(1));
    return Optional.empty();
  }
}
