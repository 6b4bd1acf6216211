package beamwarden.document;

import java.util.HashMap;
import java.util.HashSet;
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
          .notRun(JobReader.NOT_RUN);

  private final Map<String, Node.Field> recipes = new HashMap<>();
  private final Set<String> used = new HashSet<>();
  private final Problems problems;

  /** Reads the names; the values are read with the jobs that build on them. */
  Recipes(Optional<Node> node, Values values, Problems problems) {
    this.problems = problems;
    node.flatMap(
            found ->
                values.group(found, "recipes: { gentle: { mode: intensity-map, voltage: 8 kV } }"))
        .ifPresent(
            group -> {
              for (Node.Field recipe : group.fields()) {
                values.id(recipe.key());
                recipes.put(recipe.key().text(), recipe);
                values
                    .group(recipe.value(), "{ mode: intensity-map, voltage: 8 kV }")
                    .ifPresent(keys -> KEYS.checkUnknown(keys, problems));
              }
            });
  }

  /** The values of the recipe that a job names. */
  Optional<Fields> of(Node.Scalar name) {
    Node.Field recipe = recipes.get(name.text());
    if (recipe == null) {
      problems.error(
          name,
          "there is no recipe " + Printed.quoted(name.text()),
          Near.advice(name.text(), recipes.keySet()));
      return Optional.empty();
    }
    used.add(name.text());
    return recipe.value() instanceof Node.Mapping group
        ? Optional.of(new Fields(group, Optional.empty(), KEYS.of(), problems))
        : Optional.empty();
  }

  void warnOfUnused() {
    recipes.forEach(
        (name, recipe) -> {
          if (!used.contains(name)) {
            problems.warning(
                recipe.key(),
                "no job builds on the recipe " + Printed.quoted(name),
                "leave it out, or name it in a job");
          }
        });
  }
}
