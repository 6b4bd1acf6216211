package beamwarden.document;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Mode;
import beamwarden.beam.Region;
import beamwarden.document.Values.Sign;
import beamwarden.instrument.Column;
import beamwarden.profile.Profile;
import beamwarden.quantity.Current;
import beamwarden.quantity.Voltage;
import beamwarden.queue.Acquisition;
import beamwarden.queue.AtCap;
import beamwarden.queue.Job;
import beamwarden.queue.Sample;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;

/** Reads jobs and checks them against the instrument. */
final class JobReader {
  /** Keys that this version knows and does not run, each with what to write instead. */
  static final Map<String, String> NOT_RUN =
      new TreeMap<>(
          Map.of(
              "integration", "write a job of a mode that is run",
              "analyser", "leave it out; every pass is made without an analyser",
              "grating", "leave it out; a map through filters needs none",
              "slit", "leave it out; a map through filters needs none",
              "repetition", "leave it out; the beam is not pulsed",
              "registration", "leave it out; the uncertainty of the placement covers drift",
              "prior-dose", "leave it out, and set a cap that leaves no room for more"));

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
          .notRun(NOT_RUN);
  private static final String EXAMPLE = "{ id: survey, sample: sst-07, mode: electron-image, … }";
  private static final Map<String, AtCap> AT_CAP =
      Map.of("refuse", AtCap.REFUSE, "trim", AtCap.TRIM, "ask", AtCap.ASK);

  private final Profile profile;
  private final Map<String, Optional<Sample>> samples;
  private final Values values;
  private final Problems problems;
  private final AcquisitionReader acquisitions;
  private final RegionReader regions;
  private final LabTime times;

  JobReader(
      Profile profile, Map<String, Optional<Sample>> samples, Values values, Problems problems) {
    this.profile = profile;
    this.samples = samples;
    this.values = values;
    this.problems = problems;
    this.acquisitions = new AcquisitionReader(profile, values, problems);
    this.regions = new RegionReader(profile, values, problems);
    this.times = new LabTime(profile.zone(), values, problems);
  }

  /** The values of a job, completed by those of its recipe. */
  Optional<Fields> fields(Node node, Recipes recipes) {
    Optional<Node.Mapping> group = values.group(node, EXAMPLE);
    if (group.isEmpty()) {
      return Optional.empty();
    }
    KEYS.checkUnknown(group.get(), problems);
    Fields own = new Fields(group.get(), Optional.empty(), KEYS.of(), problems);
    Optional<Fields> recipe =
        own.get("recipe").flatMap(name -> values.scalar(name, "gentle")).flatMap(recipes::of);
    return Optional.of(new Fields(group.get(), recipe, KEYS.of(), problems));
  }

  /** The ids of the jobs after which this one comes. */
  List<Node.Scalar> after(Fields fields) {
    List<Node.Scalar> after = new ArrayList<>();
    fields
        .get("after")
        .flatMap(node -> values.list(node, "[survey]"))
        .ifPresent(
            list ->
                list.items().forEach(item -> values.scalar(item, "survey").ifPresent(after::add)));
    return after;
  }

  Optional<Job> read(Fields fields, Optional<String> id, List<Node.Scalar> after) {
    Optional<String> sample = fields.need("sample", "sst-07").flatMap(this::sample);
    Optional<Mode> mode = acquisitions.mode(fields);
    Optional<BeamSettings> beam = beam(fields);
    Optional<Acquisition> acquisition = mode.flatMap(known -> acquisitions.read(fields, known));
    Optional<Region> region =
        mode.flatMap(
            known ->
                fields
                    .need("region", RegionReader.example(known))
                    .flatMap(node -> regions.read(node, known, sample.flatMap(samples::get))));
    Optional<Integer> priority = priority(fields);
    Optional<AtCap> atCap = atCap(fields);
    Optional<Instant> earliest = fields.get("earliest").flatMap(times::moment);
    Optional<Instant> deadline = fields.get("deadline").flatMap(times::moment);
    checkOrder(fields, earliest, deadline);
    if (id.isEmpty()
        || sample.isEmpty()
        || beam.isEmpty()
        || acquisition.isEmpty()
        || region.isEmpty()) {
      return Optional.empty();
    }
    return Optional.of(
        new Job(
            id.get(),
            sample.get(),
            acquisition.get(),
            region.get(),
            beam.get(),
            priority.orElse(Job.USUAL_PRIORITY),
            after.stream().map(Node.Scalar::text).distinct().toList(),
            atCap.orElse(AtCap.REFUSE),
            earliest,
            deadline));
  }

  private Optional<String> sample(Node node) {
    return values
        .scalar(node, "sst-07")
        .map(Node.Scalar::text)
        .filter(
            name -> {
              boolean known = samples.containsKey(name);
              if (!known) {
                problems.error(
                    node,
                    "this queue has no sample " + Printed.quoted(name),
                    Near.advice(name, samples.keySet()));
              }
              return known;
            });
  }

  private Optional<BeamSettings> beam(Fields fields) {
    Column column = profile.abilities().column();
    String whose = profile.abilities().instrument();
    Optional<Voltage> voltage =
        fields
            .need("voltage", "8 kV")
            .flatMap(
                node ->
                    values
                        .voltage(node)
                        .flatMap(
                            value ->
                                values.within(
                                    node,
                                    value,
                                    column.lowestVoltage(),
                                    column.highestVoltage(),
                                    whose,
                                    Voltage::toString)));
    Optional<Current> current =
        fields
            .need("current", "350 pA")
            .flatMap(
                node ->
                    values
                        .current(node, Sign.POSITIVE)
                        .flatMap(
                            value ->
                                values.within(
                                    node,
                                    value,
                                    column.lowestCurrent(),
                                    column.highestCurrent(),
                                    whose,
                                    Current::toString)));
    return voltage.isEmpty() || current.isEmpty()
        ? Optional.empty()
        : Optional.of(new BeamSettings(voltage.get(), current.get()));
  }

  private Optional<Integer> priority(Fields fields) {
    return fields
        .get("priority")
        .flatMap(node -> values.whole(node, Job.LOWEST_PRIORITY, Job.HIGHEST_PRIORITY))
        .map(Long::intValue);
  }

  private Optional<AtCap> atCap(Fields fields) {
    return fields
        .get("at-cap")
        .flatMap(node -> values.choice(node, AT_CAP, List.of("refuse", "trim", "ask")));
  }

  private void checkOrder(Fields fields, Optional<Instant> earliest, Optional<Instant> deadline) {
    if (earliest.isPresent() && deadline.isPresent() && !earliest.get().isBefore(deadline.get())) {
      problems.error(
          fields.get("deadline").orElseThrow(),
          "deadline does not come after earliest",
          "write a later deadline, or leave one of the two out");
    }
  }
}
