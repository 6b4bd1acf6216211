package beamwarden.document;

import beamwarden.beam.Conditions;
import beamwarden.document.Quantities.Range;
import beamwarden.document.Quantities.Sign;
import beamwarden.instrument.Filter;
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
  private static final Keys KEYS = Keys.of("a set of filters", CHANGE);
  private static final String EXAMPLE = "{ violet: [380 nm, 450 nm], change: 4 s }";

  private final Values values;
  private final Quantities quantities;
  private final Problems problems;

  FiltersReader(Values values, Problems problems) {
    this.values = values;
    this.problems = problems;
    this.quantities = new Quantities(values, problems);
  }

  /**
   * The filters of a profile.
   *
   * @param byName each filter by its name
   * @param change the time to change from one to another
   */
  record Filters(Map<String, Filter> byName, Duration change) {}

  Optional<Filters> read(Node node) {
    return values.group(node, EXAMPLE).flatMap(this::filters);
  }

  private Optional<Filters> filters(Node.Mapping group) {
    Map<String, Filter> filters = new LinkedHashMap<>();
    for (Node.Field field : group.fields()) {
      if (!field.key().text().equals(CHANGE)) {
        filter(field).ifPresent(filter -> filters.put(field.key().text(), filter));
      }
    }
    return new Fields(group, KEYS, problems)
        .need(CHANGE, "4 s", node -> quantities.time(node, Sign.NOT_NEGATIVE))
        .map(change -> new Filters(filters, change));
  }

  private Optional<Filter> filter(Node.Field field) {
    if (field.key().text().equals(Conditions.PANCHROMATIC)) {
      problems.error(
          field.key(),
          "panchromatic stands for no filter at all",
          "leave it out; it needs no entry here");
    }
    Optional<String> name = values.id(field.key(), "violet");
    Optional<Range<Length>> range =
        quantities.range(
            field.value(), "[380 nm, 450 nm]", item -> quantities.length(item, Sign.POSITIVE));
    return Values.all(name, range)
        ? Optional.of(new Filter(range.get().low(), range.get().high()))
        : Optional.empty();
  }
}
