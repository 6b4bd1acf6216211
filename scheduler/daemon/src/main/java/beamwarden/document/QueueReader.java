package beamwarden.document;

import beamwarden.profile.Profile;
import beamwarden.queue.Job;
import beamwarden.queue.Queue;
import beamwarden.queue.Sample;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/** Reads a whole queue: its samples, its recipes, its jobs and their order. */
final class QueueReader {
  private static final Keys KEYS = Keys.of("a queue", "queue", "samples", "recipes", "jobs");
  private static final String SAMPLE_EXAMPLE = "[{ id: sst-07, placement: …, caps: … }]";
  private static final String JOB_EXAMPLE = "[{ id: survey, sample: sst-07, … }]";

  private final Profile profile;
  private final Problems problems;
  private final Values values;

  QueueReader(Profile profile, Problems problems) {
    this.profile = profile;
    this.problems = problems;
    this.values = new Values(problems);
  }

  Optional<Queue> read(Node top) {
    if (!(top instanceof Node.Mapping group)) {
      problems.error(
          top,
          "the document is " + top.kind() + ", where a queue is expected",
          "begin with queue: and a name, then samples: and jobs:");
      return Optional.empty();
    }
    KEYS.check(group, problems);
    Fields fields = new Fields(group, Optional.empty(), KEYS.of(), problems);
    Optional<String> name =
        fields.need("queue", "first-night").flatMap(node -> values.id(node, "first-night"));
    Map<String, Optional<Sample>> samples = samples(fields);
    Recipes recipes = new Recipes(fields.get("recipes"), values, problems);
    List<Job> jobs = jobs(fields, samples, recipes);
    recipes.warnOfUnused();
    return name.map(
        known ->
            new Queue(known, samples.values().stream().flatMap(Optional::stream).toList(), jobs));
  }

  /** Samples by id; one that has problems of its own is known and empty. */
  private Map<String, Optional<Sample>> samples(Fields fields) {
    Map<String, Optional<Sample>> samples = new LinkedHashMap<>();
    Map<String, Node> first = new HashMap<>();
    SampleReader reader = new SampleReader(profile, values, problems);
    for (Node node : items(fields, "samples", SAMPLE_EXAMPLE)) {
      Optional<Fields> sample = reader.fields(node);
      Optional<String> id = sample.flatMap(found -> newId(found, "sst-07", first));
      Optional<Sample> read = sample.flatMap(found -> reader.read(found, id));
      id.ifPresent(known -> samples.put(known, read));
    }
    return samples;
  }

  private List<Job> jobs(Fields fields, Map<String, Optional<Sample>> samples, Recipes recipes) {
    JobReader reader = new JobReader(profile, samples, values, problems);
    AfterOrder order = new AfterOrder(problems);
    Map<String, Node> first = new HashMap<>();
    List<Job> jobs = new ArrayList<>();
    for (Node node : items(fields, "jobs", JOB_EXAMPLE)) {
      Optional<Fields> job = reader.fields(node, recipes);
      Optional<String> id = job.flatMap(found -> newId(found, "survey", first));
      List<Node.Scalar> after = job.map(reader::after).orElse(List.of());
      id.ifPresent(known -> order.add(known, after));
      job.flatMap(found -> reader.read(found, id, after)).ifPresent(jobs::add);
    }
    order.check();
    return jobs;
  }

  private List<Node> items(Fields fields, String key, String example) {
    List<Node> items =
        fields
            .need(key, example)
            .flatMap(node -> values.list(node, example))
            .map(Node.Sequence::items)
            .orElse(List.of());
    fields
        .get(key)
        .filter(node -> node instanceof Node.Sequence list && list.items().isEmpty())
        .ifPresent(
            node ->
                problems.error(
                    node, key + " is empty", "write for example " + key + ": " + example));
    return items;
  }

  private Optional<String> newId(Fields fields, String example, Map<String, Node> first) {
    Optional<Node> node = fields.need("id", example);
    Optional<String> id = node.flatMap(found -> values.id(found, example));
    id.ifPresent(
        known -> {
          Node before = first.putIfAbsent(known, node.get());
          if (before != null) {
            problems.error(
                node.get(),
                "the id " + known + " is given twice, first in line " + before.mark().line(),
                "write another id for one of the two");
          }
        });
    return id;
  }
}
