package beamwarden.answer;

import beamwarden.dose.Delivery;
import beamwarden.report.GrantLine;
import com.fasterxml.jackson.annotation.JsonProperty;
import java.time.Duration;
import java.time.Instant;

/**
 * One grant in a sample's dose books.
 *
 * @param grant its number
 * @param at when it was stored
 * @param state where it stands: open, booked, presumed or void; void ones count nothing
 * @param job the id of its job
 * @param pass which of the job's passes it is a part of, counted from 0
 * @param unitsTouched units into which electrons may have gone: lines, or nanoseconds at a point
 * @param beamOnSeconds the best value of the beam-on time
 * @param upperBeamOnSeconds the longest it can have been on
 * @param currentAmperes the best value of the current
 * @param upperCurrentAmperes the highest it can have been
 * @param chargeCoulombs the best value of the charge
 * @param upperChargeCoulombs the upper value of it
 * @param because why it is presumed or void; empty otherwise
 */
public record GrantAnswer(
    @JsonProperty("grant") long grant,
    @JsonProperty("at") Instant at,
    @JsonProperty("state") String state,
    @JsonProperty("job") String job,
    @JsonProperty("pass") int pass,
    @JsonProperty("units_touched") long unitsTouched,
    @JsonProperty("beam_on_s") double beamOnSeconds,
    @JsonProperty("upper_beam_on_s") double upperBeamOnSeconds,
    @JsonProperty("current_A") double currentAmperes,
    @JsonProperty("upper_current_A") double upperCurrentAmperes,
    @JsonProperty("charge_C") double chargeCoulombs,
    @JsonProperty("upper_charge_C") double upperChargeCoulombs,
    @JsonProperty("because") String because) {
  static GrantAnswer of(GrantLine line) {
    Delivery counted = line.counted();
    double share = line.counts() ? 1 : 0;
    return new GrantAnswer(
        line.grant(),
        line.openedAt(),
        line.state().text(),
        line.job(),
        counted.exposure().pass(),
        line.counts() ? counted.unitsTouched() : 0,
        share * seconds(counted.bestBeamOn()),
        share * seconds(counted.upperBeamOn()),
        counted.bestCurrent().amperes(),
        counted.upperCurrent().amperes(),
        share * counted.bestCurrent().chargeIn(counted.bestBeamOn()).coulombs(),
        share * counted.upperCurrent().chargeIn(counted.upperBeamOn()).coulombs(),
        line.because());
  }

  static double seconds(Duration time) {
    return time.toNanos() / 1e9;
  }
}
