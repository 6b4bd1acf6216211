package beamwarden.document;

import beamwarden.document.Quantities.Sign;
import beamwarden.instrument.Blanker;
import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/** Reads what a profile says of the blanker. */
final class BlankerReader {
  static final String EXAMPLE = "{ kind: fast, alone: 0.1 ms }";

  private static final Keys KEYS = Keys.of("a blanker", "kind", "alone");
  private static final Map<String, Blanker.Kind> KINDS =
      Map.of("fast", Blanker.Kind.FAST, "slow", Blanker.Kind.SLOW, "none", Blanker.Kind.NONE);

  private final Values values;
  private final Quantities quantities;
  private final Problems problems;

  BlankerReader(Values values, Problems problems) {
    this.values = values;
    this.problems = problems;
    this.quantities = new Quantities(values, problems);
  }

  Optional<Blanker> blanker(Node node) {
    Optional<Fields> fields = values.fields(node, EXAMPLE, KEYS);
    Optional<Blanker.Kind> kind = fields.flatMap(found -> found.need("kind", "fast", this::kind));
    Optional<Duration> alone =
        fields
            .flatMap(found -> found.get("alone"))
            .flatMap(found -> quantities.time(found, Sign.POSITIVE));
    return kind.map(known -> new Blanker(known, alone));
  }

  private Optional<Blanker.Kind> kind(Node node) {
    Optional<Blanker.Kind> kind = values.choice(node, KINDS, List.of("fast", "slow"));
    if (kind.equals(Optional.of(Blanker.Kind.NONE))) {
      problems.error(
          node,
          Keys.notRunMessage("an instrument without a blanker"),
          "write fast or slow when it has one; without one the beam burns the sample while it"
              + " waits");
    }
    return kind;
  }
}
