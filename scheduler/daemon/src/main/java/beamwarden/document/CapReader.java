package beamwarden.document;

import beamwarden.document.Values.Sign;
import beamwarden.profile.Profile;
import beamwarden.quantity.Fluence;
import beamwarden.queue.Area;
import beamwarden.queue.Averaging;
import beamwarden.queue.Averaging.OverGeneration;
import beamwarden.queue.Averaging.OverLength;
import beamwarden.queue.Averaging.OverProbe;
import beamwarden.queue.Cap;
import beamwarden.queue.Cap.OnCharge;
import beamwarden.queue.Cap.OnFluence;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/** Reads the caps of a sample. */
final class CapReader {
  private static final String INSTEAD = "write a fluence or a charge instead";
  private static final Keys KEYS =
      Keys.of("a cap", "fluence", "over", "charge", "area", "because")
          .notRun(Map.of("absorbed", INSTEAD, "fluence-rate", INSTEAD, "current", INSTEAD));
  private static final String EXAMPLE = "[{ fluence: 9000 e/nm2 }, { charge: 40 uC }]";

  private final Profile profile;
  private final Values values;
  private final Problems problems;

  CapReader(Profile profile, Values values, Problems problems) {
    this.profile = profile;
    this.values = values;
    this.problems = problems;
  }

  /** All caps of a sample, those with problems left out; an area may ask for one. */
  List<Cap> read(Fields sample, List<Area> areas, boolean materialKnown) {
    List<Cap> caps = new ArrayList<>();
    Optional<Node.Sequence> list =
        sample.need("caps", EXAMPLE).flatMap(node -> values.list(node, EXAMPLE));
    for (Node node : list.map(Node.Sequence::items).orElse(List.of())) {
      values
          .group(node, "- fluence: 9000 e/nm2")
          .flatMap(group -> cap(group, sample, areas, materialKnown))
          .ifPresent(caps::add);
    }
    list.filter(found -> found.items().isEmpty())
        .ifPresent(
            found ->
                problems.warning(
                    found,
                    "nothing limits what this sample may receive",
                    "write for example caps: " + EXAMPLE));
    list.ifPresent(found -> checkSacrificial(found, areas));
    return caps;
  }

  private Optional<Cap> cap(
      Node.Mapping group, Fields sample, List<Area> areas, boolean materialKnown) {
    KEYS.check(group, problems);
    Fields fields = new Fields(group, Optional.empty(), KEYS.of(), problems);
    Optional<String> area = fields.get("area").flatMap(node -> area(node, sample, areas));
    boolean areaBroken = fields.has("area") && area.isEmpty();
    Optional<Cap> cap =
        kind(fields)
            .flatMap(
                kind ->
                    kind.equals("fluence")
                        ? onFluence(fields, area, materialKnown)
                        : onCharge(fields, area));
    return areaBroken ? Optional.empty() : cap;
  }

  /** Which of the kinds a cap is; none, or two at once, is a problem. */
  private Optional<String> kind(Fields fields) {
    boolean fluence = fields.has("fluence");
    boolean charge = fields.has("charge");
    boolean other = KEYS.notRun().keySet().stream().anyMatch(fields::has);
    if (fluence && charge) {
      problems.error(
          fields.group(), "a cap limits both fluence and charge", "write a cap for each of them");
    } else if (!fluence && !charge && !other) {
      problems.error(
          fields.group(), "a cap limits nothing", "write for example fluence: 9000 e/nm2");
    }
    return fluence == charge ? Optional.empty() : Optional.of(fluence ? "fluence" : "charge");
  }

  private Optional<Cap> onFluence(Fields fields, Optional<String> area, boolean materialKnown) {
    Optional<Fluence> limit = fields.get("fluence").flatMap(values::fluence);
    Optional<Averaging> over =
        fields.has("over")
            ? fields.get("over").flatMap(node -> averaging(node, materialKnown))
            : generation(fields.group(), materialKnown);
    return limit.isEmpty() || over.isEmpty()
        ? Optional.empty()
        : Optional.of(new OnFluence(limit.get(), over.get(), area, because(fields)));
  }

  private Optional<Cap> onCharge(Fields fields, Optional<String> area) {
    fields
        .get("over")
        .ifPresent(
            node ->
                problems.error(
                    node, "a cap on charge does not average over a length", "leave over out"));
    return fields
        .get("charge")
        .flatMap(values::charge)
        .map(limit -> new OnCharge(limit, area, because(fields)));
  }

  private Optional<Averaging> averaging(Node node, boolean materialKnown) {
    String text = node instanceof Node.Scalar scalar ? scalar.text() : "";
    if (text.equals("generation")) {
      return generation(node, materialKnown);
    }
    if (text.equals("probe")) {
      return probe(node);
    }
    return values.length(node, Sign.POSITIVE).map(OverLength::new);
  }

  private Optional<Averaging> generation(Node node, boolean materialKnown) {
    if (materialKnown) {
      return Optional.of(new OverGeneration());
    }
    problems.error(
        node,
        "this cap averages over the generation range, and the sample's material is not given",
        "write the sample's material, or a length such as over: 200 nm");
    return Optional.empty();
  }

  private Optional<Averaging> probe(Node node) {
    if (!profile.abilities().probes().isEmpty()) {
      return Optional.of(new OverProbe());
    }
    problems.error(
        node,
        "this cap averages over the probe, and "
            + profile.abilities().instrument()
            + " has no measured probe",
        "write a probe in the profile, or a length such as over: 5 nm");
    return Optional.empty();
  }

  private Optional<String> area(Node node, Fields sample, List<Area> areas) {
    List<String> known = names(sample, areas);
    return values
        .scalar(node, "kept")
        .map(Node.Scalar::text)
        .filter(
            name -> {
              boolean found = known.contains(name);
              if (!found) {
                problems.error(
                    node,
                    "this sample has no area " + Printed.quoted(name),
                    Near.advice(name, known));
              }
              return found;
            });
  }

  /** The names of all areas as they are written, those with problems included. */
  private static List<String> names(Fields sample, List<Area> areas) {
    if (sample.get("areas").orElse(null) instanceof Node.Mapping group) {
      return group.fields().stream().map(field -> field.key().text()).toList();
    }
    return areas.stream().map(Area::name).toList();
  }

  private void checkSacrificial(Node.Sequence list, List<Area> areas) {
    for (Area area : areas) {
      if (area.use() == Area.Use.SACRIFICIAL
          && list.items().stream().noneMatch(cap -> limitsCharge(cap, area.name()))) {
        problems.error(
            list,
            "the sacrificial area " + area.name() + " has no cap on its charge",
            "write for example - { charge: 2.5 uC, area: " + area.name() + " }");
      }
    }
  }

  /** Whether a cap, with or without problems, is meant to limit the charge into an area. */
  private boolean limitsCharge(Node cap, String area) {
    if (!(cap instanceof Node.Mapping group)) {
      return false;
    }
    Fields fields = new Fields(group, Optional.empty(), KEYS.of(), problems);
    return fields.has("charge")
        && fields.get("area").orElse(null) instanceof Node.Scalar name
        && name.text().equals(area);
  }

  private String because(Fields fields) {
    return fields.get("because").flatMap(node -> values.text(node, "kept for later")).orElse("");
  }
}
