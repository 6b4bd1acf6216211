package beamwarden.document;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Mode;
import beamwarden.beam.Region;
import beamwarden.instrument.Column;
import beamwarden.profile.Profile;
import beamwarden.quantity.Current;
import beamwarden.quantity.Voltage;
import beamwarden.queue.Acquisition;
import beamwarden.queue.AtCap;
import beamwarden.queue.Job;
import beamwarden.queue.Sample;
import java.time.Instant;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/** Reads jobs and checks them against the instrument. */
final class JobReader {
  private static final Keys KEYS =
      Keys.of(
              "a job",
              "id",
              "sample",
              "recipe",
              "mode",
              "voltage",
              "current",
              "dwell",
              "region",
              "pixels",
              "filters",
              "frames",
              "until",
              "also",
              "priority",
              "after",
              "at-cap",
              "earliest",
              "deadline")
          .accepting(AcquisitionReader.NOT_RUN.keySet());
  private static final String EXAMPLE = "{ id: survey, sample: sst-07, mode: electron-image, … }";
  private static final Map<String, AtCap> AT_CAP =
      Map.of("refuse", AtCap.REFUSE, "trim", AtCap.TRIM, "ask", AtCap.ASK);

  private final Profile profile;
  private final Map<String, Optional<Sample>> samples;
  private final Recipes recipes;
  private final Values values;
  private final Quantities quantities;
  private final Problems problems;
  private final AcquisitionReader acquisitions;
  private final RegionReader regions;
  private final LabTime times;

  /**
   * Reads jobs of one queue.
   *
   * @param samples the samples of the queue by id; one with problems of its own is empty
   * @param recipes the recipes of the queue
   */
  JobReader(
      Profile profile, Map<String, Optional<Sample>> samples, Recipes recipes, Problems problems) {
    this.profile = profile;
    this.samples = samples;
    this.recipes = recipes;
    this.problems = problems;
    this.values = new Values(problems);
    this.quantities = new Quantities(values, problems);
    this.acquisitions = new AcquisitionReader(profile, values, problems);
    this.regions = new RegionReader(profile, values, problems);
    this.times = new LabTime(profile.zone(), values, problems);
  }

  /** The values of a job, completed by those of its recipe. */
  Optional<Fields> fields(Node node) {
    return values
        .fields(node, EXAMPLE, KEYS)
        .map(
            own -> own.get("recipe").map(name -> own.completedBy(recipes.named(name))).orElse(own));
  }

  /** The ids of the jobs after which this one comes. */
  List<Node.Scalar> after(Fields fields) {
    return fields
        .get("after")
        .flatMap(node -> values.list(node, "[survey]"))
        .map(list -> list.items().stream().flatMap(item -> name(item).stream()).toList())
        .orElse(List.of());
  }

  private Optional<Node.Scalar> name(Node item) {
    return values.scalar(item, "survey");
  }

  Optional<Job> read(Fields fields, Optional<String> id, List<Node.Scalar> after) {
    Optional<String> sample =
        fields.need(
            "sample",
            "sst-07",
            node -> values.known(node, samples.keySet(), "this queue has no sample", "sst-07"));
    Optional<BeamSettings> beam = beam(fields);
    Optional<Mode> mode = acquisitions.mode(fields);
    Optional<Acquisition> acquisition = mode.flatMap(known -> acquisitions.read(fields, known));
    Optional<Region> region =
        mode.flatMap(known -> regions.read(fields, known, sample.flatMap(samples::get)));
    if (Values.all(acquisition, region)) {
      new JobSize(problems).check(fields, acquisition.get(), region.get());
    }
    int priority =
        fields.or(
            "priority",
            Job.USUAL_PRIORITY,
            node ->
                values.whole(node, Job.LOWEST_PRIORITY, Job.HIGHEST_PRIORITY).map(Long::intValue));
    AtCap atCap =
        fields.or(
            "at-cap",
            AtCap.REFUSE,
            node -> values.choice(node, AT_CAP, List.of("refuse", "trim", "ask")));
    Optional<Instant> earliest = fields.get("earliest").flatMap(times::moment);
    Optional<Instant> deadline = fields.get("deadline").flatMap(times::moment);
    checkOrder(fields, earliest, deadline);
    if (!Values.all(id, sample, beam, acquisition, region)) {
      return Optional.empty();
    }
    return Optional.of(
        new Job(
            id.get(),
            sample.get(),
            acquisition.get(),
            region.get(),
            beam.get(),
            priority,
            after.stream().map(Node.Scalar::text).distinct().toList(),
            atCap,
            earliest,
            deadline));
  }

  private Optional<BeamSettings> beam(Fields fields) {
    Column column = profile.abilities().column();
    String whose = profile.abilities().instrument();
    Optional<Voltage> voltage =
        fields.need(
            "voltage",
            "8 kV",
            node ->
                quantities
                    .voltage(node)
                    .flatMap(
                        value ->
                            quantities.within(
                                node,
                                value,
                                column.lowestVoltage(),
                                column.highestVoltage(),
                                whose)));
    Optional<Current> current =
        fields.need(
            "current",
            "350 pA",
            node ->
                quantities
                    .current(node)
                    .flatMap(
                        value ->
                            quantities.within(
                                node,
                                value,
                                column.lowestCurrent(),
                                column.highestCurrent(),
                                whose)));
    return Values.all(voltage, current)
        ? Optional.of(new BeamSettings(voltage.get(), current.get()))
        : Optional.empty();
  }

  private void checkOrder(Fields fields, Optional<Instant> earliest, Optional<Instant> deadline) {
    if (Values.all(earliest, deadline) && !earliest.get().isBefore(deadline.get())) {
      problems.error(
          fields.get("deadline").orElseThrow(),
          "deadline does not come after earliest",
          "write a later deadline, or leave one of the two out");
    }
  }
}
