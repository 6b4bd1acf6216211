package beamwarden.report;

import beamwarden.beam.Point;
import beamwarden.dose.Standing;
import beamwarden.queue.Cap;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;

/**
 * How much of a cap is used.
 *
 * @param kind {@code fluence} or {@code charge}
 * @param area the name of the area in which it holds; empty for the whole sample
 * @param unit the unit of its values: e/nm2 or C
 * @param limit its limit
 * @param booked the best value of what is booked; empty when it cannot be worked out
 * @param upper the upper value of what is booked, by which the cap is enforced; empty likewise
 * @param left what it leaves; zero when nothing, or when that cannot be worked out
 * @param at where the upper value is reached, for a fluence
 * @param because why it was set, in its owner's words; may be empty
 */
public record CapReport(
    String kind,
    Optional<String> area,
    String unit,
    double limit,
    OptionalDouble booked,
    OptionalDouble upper,
    double left,
    Optional<Point> at,
    String because) {
  static CapReport of(Cap cap, List<Standing> standings) {
    return standings.stream()
        .filter(standing -> standing.cap().equals(cap))
        .findFirst()
        .map(CapReport::of)
        .orElseGet(() -> unknown(cap));
  }

  private static CapReport of(Standing standing) {
    return new CapReport(
        kind(standing.cap()),
        standing.cap().area(),
        standing.unit(),
        standing.limit(),
        OptionalDouble.of(standing.best()),
        OptionalDouble.of(standing.upper()),
        standing.left(),
        standing.at(),
        standing.cap().because());
  }

  private static CapReport unknown(Cap cap) {
    boolean fluence = cap instanceof Cap.OnFluence;
    double limit =
        cap instanceof Cap.OnFluence onFluence
            ? onFluence.limit().electronsPerSquareNanometre()
            : ((Cap.OnCharge) cap).limit().coulombs();
    return new CapReport(
        kind(cap),
        cap.area(),
        fluence ? "e/nm2" : "C",
        limit,
        OptionalDouble.empty(),
        OptionalDouble.empty(),
        0,
        Optional.empty(),
        cap.because());
  }

  private static String kind(Cap cap) {
    return cap instanceof Cap.OnFluence ? "fluence" : "charge";
  }
}
