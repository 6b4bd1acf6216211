package beamwarden.answer;

import beamwarden.report.SampleReport;
import com.fasterxml.jackson.annotation.JsonProperty;
import java.util.List;

/**
 * What a sample has received and what its caps leave.
 *
 * @param id its id
 * @param label what a person calls it
 * @param caps its caps
 * @param chargeCoulombs the best value of the charge it received
 * @param upperChargeCoulombs the upper value of it
 * @param asksForApproval whether a looser version of it waits to be approved
 */
public record SampleAnswer(
    @JsonProperty("id") String id,
    @JsonProperty("label") String label,
    @JsonProperty("caps") List<CapAnswer> caps,
    @JsonProperty("charge_C") double chargeCoulombs,
    @JsonProperty("upper_charge_C") double upperChargeCoulombs,
    @JsonProperty("asks_for_approval") boolean asksForApproval) {
  /** The answer that says what a report does. */
  public static SampleAnswer of(SampleReport report) {
    return new SampleAnswer(
        report.id(),
        report.label(),
        report.caps().stream().map(CapAnswer::of).toList(),
        report.charge().coulombs(),
        report.upperCharge().coulombs(),
        report.asksForApproval());
  }
}
