package beamwarden.answer;

import beamwarden.report.CapReport;
import com.fasterxml.jackson.annotation.JsonProperty;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;

/**
 * How much of a cap is used.
 *
 * @param kind {@code fluence} or {@code charge}
 * @param area the name of the area in which it holds; null for the whole sample
 * @param unit the unit of its values: e/nm2 or C
 * @param limit its limit
 * @param booked the best value of what is booked; null when it cannot be worked out
 * @param upper the upper value of it, by which the cap is enforced; null likewise
 * @param left what it leaves
 * @param atMetres where the upper value is reached, for a fluence
 * @param because why it was set
 */
public record CapAnswer(
    @JsonProperty("kind") String kind,
    @JsonProperty("area") Optional<String> area,
    @JsonProperty("unit") String unit,
    @JsonProperty("limit") double limit,
    @JsonProperty("booked") OptionalDouble booked,
    @JsonProperty("upper") OptionalDouble upper,
    @JsonProperty("left") double left,
    @JsonProperty("at_m") Optional<List<Double>> atMetres,
    @JsonProperty("because") String because) {
  static CapAnswer of(CapReport report) {
    return new CapAnswer(
        report.kind(),
        report.area(),
        report.unit(),
        report.limit(),
        report.booked(),
        report.upper(),
        report.left(),
        report.at().map(Places::metres),
        report.because());
  }
}
