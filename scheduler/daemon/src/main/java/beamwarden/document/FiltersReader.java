package beamwarden.document;

import beamwarden.beam.Conditions;
import beamwarden.document.Values.Range;
import beamwarden.document.Values.Sign;
import beamwarden.instrument.Filter;
import beamwarden.quantity.Dimension;
import beamwarden.quantity.Length;
import java.time.Duration;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.Optional;

/** Reads the filters of a profile and the time to change them. */
final class FiltersReader {
  /** No filters. */
  static final Filters NONE = new Filters(Map.of(), Duration.ZERO);

  private static final String CHANGE = "change";
  private static final String EXAMPLE = "{ violet: [380 nm, 450 nm], change: 4 s }";

  private final Values values;
  private final Problems problems;

  FiltersReader(Values values, Problems problems) {
    this.values = values;
    this.problems = problems;
  }

  /**
   * The filters of a profile.
   *
   * @param byName each filter by its name
   * @param change the time to change from one to another
   */
  record Filters(Map<String, Filter> byName, Duration change) {}

  Filters read(Node node) {
    Optional<Node.Mapping> group = values.group(node, "filters: " + EXAMPLE);
    if (group.isEmpty()) {
      return NONE;
    }
    Map<String, Filter> filters = new LinkedHashMap<>();
    for (Node.Field field : group.get().fields()) {
      if (!field.key().text().equals(CHANGE)) {
        filter(field).ifPresent(filter -> filters.put(field.key().text(), filter));
      }
    }
    Fields fields = new Fields(group.get(), Optional.empty(), "filters", problems);
    Optional<Duration> change =
        fields.need(CHANGE, "4 s").flatMap(found -> values.time(found, Sign.NOT_NEGATIVE));
    return new Filters(filters, change.orElse(Duration.ZERO));
  }

  private Optional<Filter> filter(Node.Field field) {
    if (field.key().text().equals(Conditions.PANCHROMATIC)) {
      problems.error(
          field.key(),
          "panchromatic stands for no filter at all",
          "leave it out; it needs no entry here");
      return Optional.empty();
    }
    Optional<String> name = values.id(field.key());
    Optional<Range> range =
        values.range(field.value(), Dimension.LENGTH, Sign.POSITIVE, "[380 nm, 450 nm]");
    return name.isEmpty()
        ? Optional.empty()
        : range.map(
            found ->
                new Filter(
                    new Length(found.low().doubleValue()), new Length(found.high().doubleValue())));
  }
}
