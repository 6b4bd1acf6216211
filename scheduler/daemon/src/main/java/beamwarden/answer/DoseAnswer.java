package beamwarden.answer;

import beamwarden.report.DoseReport;
import com.fasterxml.jackson.annotation.JsonProperty;
import java.util.List;

/**
 * One sample's dose books: what {@link SampleAnswer} says of it, and its grants.
 *
 * @param id its id
 * @param label what a person calls it
 * @param caps its caps
 * @param chargeCoulombs the best value of the charge it received
 * @param upperChargeCoulombs the upper value of it
 * @param asksForApproval whether a looser version of it waits to be approved
 * @param head the head of its chain of entries
 * @param entries its grants, in the order in which they were stored
 */
public record DoseAnswer(
    @JsonProperty("id") String id,
    @JsonProperty("label") String label,
    @JsonProperty("caps") List<CapAnswer> caps,
    @JsonProperty("charge_C") double chargeCoulombs,
    @JsonProperty("upper_charge_C") double upperChargeCoulombs,
    @JsonProperty("asks_for_approval") boolean asksForApproval,
    @JsonProperty("head") String head,
    @JsonProperty("entries") List<GrantAnswer> entries) {
  /** The answer that says what a report does. */
  public static DoseAnswer of(DoseReport report) {
    SampleAnswer sample = SampleAnswer.of(report.sample());
    return new DoseAnswer(
        sample.id(),
        sample.label(),
        sample.caps(),
        sample.chargeCoulombs(),
        sample.upperChargeCoulombs(),
        sample.asksForApproval(),
        report.head(),
        report.grants().stream().map(GrantAnswer::of).toList());
  }
}
