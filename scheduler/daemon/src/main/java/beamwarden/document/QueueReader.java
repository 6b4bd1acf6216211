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
  private static final String SAMPLES = "[{ id: sst-07, placement: …, caps: … }]";
  private static final String JOBS = "[{ id: survey, sample: sst-07, mode: intensity-map, … }]";

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
    Fields fields = new Fields(group, KEYS, problems);
    Optional<String> name =
        fields.need("queue", "first-night", node -> values.id(node, "first-night"));
    Map<String, Optional<Sample>> samples = samples(fields);
    List<Job> jobs = jobs(fields, samples);
    return name.map(
        known ->
            new Queue(known, samples.values().stream().flatMap(Optional::stream).toList(), jobs));
  }

  /** Samples by id; one that has problems of its own is known and empty. */
  private Map<String, Optional<Sample>> samples(Fields queue) {
    SampleReader reader = new SampleReader(profile, values, problems);
    Map<String, Optional<Sample>> samples = new LinkedHashMap<>();
    Ids ids = new Ids("sst-07");
    for (Node node : items(queue, "samples", SAMPLES)) {
      Optional<Fields> fields = reader.fields(node);
      Optional<String> id = fields.flatMap(ids::next);
      Optional<Sample> sample = fields.flatMap(found -> reader.read(found, id));
      id.ifPresent(known -> samples.putIfAbsent(known, sample));
    }
    return samples;
  }

  private List<Job> jobs(Fields queue, Map<String, Optional<Sample>> samples) {
    Recipes recipes = new Recipes(queue.get("recipes"), values, problems);
    JobReader reader = new JobReader(profile, samples, recipes, problems);
    AfterOrder order = new AfterOrder(problems);
    List<Job> jobs = new ArrayList<>();
    Ids ids = new Ids("survey");
    for (Node node : items(queue, "jobs", JOBS)) {
      Optional<Fields> fields = reader.fields(node);
      Optional<String> id = fields.flatMap(ids::next);
      List<Node.Scalar> after = fields.map(reader::after).orElse(List.of());
      id.ifPresent(known -> order.add(known, after));
      fields.flatMap(found -> reader.read(found, id, after)).ifPresent(jobs::add);
    }
    order.check();
    if (!jobs.isEmpty()) {
      recipes.warnOfUnused();
    }
    return jobs;
  }

  private List<Node> items(Fields queue, String key, String example) {
    return queue
        .need(key, example, node -> Optional.of(values.items(node, example)))
        .orElse(List.of());
  }

  /** The ids of one kind of thing, each once. */
  private final class Ids {
    private final String example;
    private final Map<String, Node> first = new HashMap<>();

    Ids(String example) {
      this.example = example;
    }

    Optional<String> next(Fields fields) {
      return fields.need(
          "id", example, node -> values.id(node, example).filter(id -> isNew(id, node)));
    }

    private boolean isNew(String id, Node node) {
      Node before = first.putIfAbsent(id, node);
      if (before != null) {
        problems.error(
            node,
            "the id " + id + " is given twice, first in line " + before.mark().line(),
            "write another id for one of the two");
      }
      return before == null;
    }
  }
}
