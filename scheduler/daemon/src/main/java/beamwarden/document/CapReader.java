package beamwarden.document;

import beamwarden.document.Quantities.Sign;
import beamwarden.profile.Profile;
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
  private static final String INSTEAD = "write a cap on fluence or charge instead";
  private static final Keys KEYS =
      Keys.of("a cap", "fluence", "over", "charge", "area", "because")
          .notRun(Map.of("absorbed", INSTEAD, "fluence-rate", INSTEAD, "current", INSTEAD));
  private static final String CAP = "{ fluence: 9000 e/nm2 }";
  private static final String EXAMPLE = "[" + CAP + ", { charge: 40 uC }]";

  private final Profile profile;
  private final Values values;
  private final Quantities quantities;
  private final Problems problems;

  CapReader(Profile profile, Values values, Problems problems) {
    this.profile = profile;
    this.values = values;
    this.problems = problems;
    this.quantities = new Quantities(values, problems);
  }

  /** All caps of a sample, those with problems left out. */
  List<Cap> read(Fields sample, List<Area> areas, boolean materialKnown) {
    Optional<Node.Sequence> list = sample.need("caps", EXAMPLE, node -> values.list(node, EXAMPLE));
    List<String> names = names(sample);
    List<Cap> caps = new ArrayList<>();
    for (Node node : list.map(Node.Sequence::items).orElse(List.of())) {
      values
          .fields(node, CAP, KEYS)
          .flatMap(fields -> cap(fields, names, materialKnown))
          .ifPresent(caps::add);
    }
    list.ifPresent(found -> checkWhole(found, areas));
    return caps;
  }

  /** The names of all areas as they are written, those with problems included. */
  private static List<String> names(Fields sample) {
    return sample.get("areas").orElse(null) instanceof Node.Mapping group
        ? group.fields().stream().map(field -> field.key().text()).toList()
        : List.of();
  }

  private Optional<Cap> cap(Fields fields, List<String> areas, boolean materialKnown) {
    Optional<String> area =
        fields
            .get("area")
            .flatMap(node -> values.known(node, areas, "this sample has no area", "kept"));
    String because = fields.or("because", "", node -> values.text(node, "kept for later"));
    if (fields.has("fluence") && fields.has("charge")) {
      problems.error(
          fields.group(), "a cap limits both fluence and charge", "write a cap for each of them");
    }
    if (fields.has("fluence")) {
      Optional<Averaging> averaging = averaging(fields, materialKnown);
      return fields
          .get("fluence")
          .flatMap(quantities::fluence)
          .flatMap(limit -> averaging.map(over -> new OnFluence(limit, over, area, because)));
    }
    if (!fields.has("charge")) {
      checkKind(fields);
      return Optional.empty();
    }
    fields
        .key("over")
        .ifPresent(
            node ->
                problems.error(
                    node, "a cap on charge does not average over a length", "leave over out"));
    return fields
        .get("charge")
        .flatMap(quantities::charge)
        .map(limit -> new OnCharge(limit, area, because));
  }

  private void checkKind(Fields fields) {
    boolean attempted =
        KEYS.attempted(fields.group(), "fluence")
            || KEYS.attempted(fields.group(), "charge")
            || KEYS.notRun().keySet().stream().anyMatch(fields::has);
    if (!attempted) {
      problems.error(
          fields.group(), "a cap limits nothing", "write for example fluence: 9000 e/nm2");
    }
  }

  /** Over what a cap on fluence averages. */
  private Optional<Averaging> averaging(Fields fields, boolean materialKnown) {
    Node over = fields.get("over").orElse(fields.group());
    String text = over instanceof Node.Scalar scalar ? scalar.text() : "generation";
    return switch (text) {
      case "generation" -> generation(over, materialKnown);
      case "probe" -> probe(over);
      default -> quantities.length(over, Sign.POSITIVE).map(OverLength::new);
    };
  }

  private Optional<Averaging> generation(Node node, boolean materialKnown) {
    if (!materialKnown) {
      problems.error(
          node,
          "this cap averages over the generation range, and the sample's material is not given",
          "write the sample's material, or a length such as over: 200 nm");
    }
    return Optional.of(new OverGeneration());
  }

  private Optional<Averaging> probe(Node node) {
    if (profile.abilities().probes().isEmpty()) {
      problems.error(
          node,
          "this cap averages over the probe, and nobody has measured the one of "
              + profile.abilities().instrument(),
          "write a length such as over: 5 nm, or a probe in the profile");
    }
    return Optional.of(new OverProbe());
  }

  private void checkWhole(Node.Sequence list, List<Area> areas) {
    if (list.items().isEmpty()) {
      problems.warning(
          list,
          "nothing limits what this sample may receive",
          "write for example caps: " + EXAMPLE);
    }
    for (Area area : areas) {
      if (area.use() == Area.Use.SACRIFICIAL
          && list.items().stream().noneMatch(cap -> limitsCharge(cap, area.name()))) {
        problems.error(
            list,
            "the sacrificial area " + area.name() + " has no cap on its charge",
            "write for example { charge: 2.5 uC, area: " + area.name() + " }");
      }
    }
  }

  /** Whether a cap, with or without problems, is meant to limit the charge into an area. */
  private boolean limitsCharge(Node cap, String area) {
    if (!(cap instanceof Node.Mapping group)) {
      return false;
    }
    Fields fields = new Fields(group, KEYS, problems);
    return fields.has("charge")
        && fields.get("area").orElse(null) instanceof Node.Scalar name
        && name.text().equals(area);
  }
}
