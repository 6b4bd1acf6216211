package beamwarden.instrument;

import beamwarden.beam.Conditions;
import beamwarden.beam.Mode;
import beamwarden.beam.Point;
import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * What one instrument can do, how long it takes, and what it guarantees.
 *
 * <p>The guarantees are what the dose books rest on: while reality keeps them, the booked upper
 * value is never below what was delivered.
 *
 * @param instrument the instrument's name in the lab
 * @param stage the sample stage
 * @param field the scan field
 * @param column the electron column
 * @param meter how the probe current is measured, and how far it may wander between readings
 * @param blanker what turns the beam off
 * @param filters the filters by name; light in the named range passes
 * @param filterChange the time to change the filter
 * @param modes what it can acquire; a mode that is missing it cannot
 * @param probes measured probe diameters; may be empty
 */
public record Abilities(
    String instrument,
    Stage stage,
    Field field,
    Column column,
    CurrentMeter meter,
    Blanker blanker,
    Map<String, Filter> filters,
    Duration filterChange,
    Map<Mode, ModeAbility> modes,
    List<Probe> probes) {
  /** Copies the collections. */
  public Abilities {
    filters = Map.copyOf(filters);
    modes = Map.copyOf(modes);
    probes = List.copyOf(probes);
  }

  /**
   * How long it takes to prepare: the column settles, then the filter changes, then the stage
   * travels, one after the other. From unknown conditions the column takes its longest settling and
   * the filter is changed.
   *
   * @param from the conditions it stands at, when they are known
   * @param fromStage where the stage stands
   * @param to the wished conditions
   * @param toStage the wished place of the stage
   */
  public Duration preparation(
      Optional<Conditions> from, Point fromStage, Conditions to, Point toStage) {
    Duration settling =
        from.map(known -> column.settling(known.beam(), to.beam()))
            .orElseGet(column::longestSettling);
    boolean filterStays = from.filter(known -> known.filter().equals(to.filter())).isPresent();
    return settling
        .plus(filterStays ? Duration.ZERO : filterChange)
        .plus(stage.travel(fromStage, toStage));
  }
}
