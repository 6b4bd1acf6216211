package beamwarden.document;

import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.Optional;
import java.util.Set;

/** The recipes of a queue by name, and which of them jobs build on. */
final class Recipes {
  private static final Keys KEYS =
      Keys.of(
              "a recipe",
              "mode",
              "voltage",
              "current",
              "dwell",
              "pixels",
              "filters",
              "frames",
              "until",
              "also",
              "priority",
              "at-cap")
          .accepting(AcquisitionReader.NOT_RUN.keySet());
  private static final String EXAMPLE = "{ mode: intensity-map, voltage: 8 kV, current: 350 pA }";

  private final Map<String, Node.Scalar> names = new LinkedHashMap<>();
  private final Map<String, Fields> recipes = new LinkedHashMap<>();
  private final Set<String> used = new HashSet<>();
  private final Values values;
  private final Problems problems;

  /** Reads names and keys; the values are read with the jobs that build on them. */
  Recipes(Optional<Node> node, Values values, Problems problems) {
    this.values = values;
    this.problems = problems;
    node.flatMap(found -> values.group(found, "{ gentle: " + EXAMPLE + " }"))
        .ifPresent(group -> group.fields().forEach(this::add));
  }

  private void add(Node.Field recipe) {
    String name = recipe.key().text();
    values.id(recipe.key(), "gentle");
    names.put(name, recipe.key());
    values.fields(recipe.value(), EXAMPLE, KEYS).ifPresent(fields -> recipes.put(name, fields));
  }

  /** The values of the recipe that a job names. */
  Optional<Fields> named(Node node) {
    Optional<String> name =
        values.known(node, names.keySet(), "this queue has no recipe", "gentle");
    name.ifPresent(used::add);
    return name.map(recipes::get);
  }

  void warnOfUnused() {
    names.forEach(
        (name, key) -> {
          if (!used.contains(name)) {
            problems.warning(
                key,
                "no job builds on the recipe " + Printed.quoted(name),
                "leave it out, or name it in a job");
          }
        });
  }
}
