package beamwarden.answer;

import beamwarden.quantity.Fluence;
import beamwarden.report.DoseAlone;
import beamwarden.report.JobReport;
import com.fasterxml.jackson.annotation.JsonProperty;
import java.time.Instant;
import java.util.List;
import java.util.Optional;

/**
 * Where a job stands and what it gave its sample, itself alone.
 *
 * @param id its id
 * @param sample the id of its sample
 * @param mode its mode
 * @param priority its priority
 * @param state its state
 * @param heldFor what it waits for when it is held
 * @param because why it is in that state; may be empty
 * @param started when its first grant was stored
 * @param ended when it ended
 * @param exposures how many receipts were booked for it
 * @param doneFraction how much of it is done, from 0 to 1
 * @param running the exposure that is being made for it, if one is
 * @param chargeCoulombs the best value of its charge
 * @param upperChargeCoulombs the upper value of it
 * @param highest the best value of its highest local fluence in e/nm2; null when unknown
 * @param upperHighest the upper value of it
 * @param highestAtMetres where the upper value is reached
 */
public record JobAnswer(
    @JsonProperty("id") String id,
    @JsonProperty("sample") String sample,
    @JsonProperty("mode") String mode,
    @JsonProperty("priority") int priority,
    @JsonProperty("state") String state,
    @JsonProperty("held_for") Optional<String> heldFor,
    @JsonProperty("because") String because,
    @JsonProperty("started") Optional<Instant> started,
    @JsonProperty("ended") Optional<Instant> ended,
    @JsonProperty("exposures") int exposures,
    @JsonProperty("done_fraction") double doneFraction,
    @JsonProperty("running") Optional<RunningAnswer> running,
    @JsonProperty("charge_C") double chargeCoulombs,
    @JsonProperty("upper_charge_C") double upperChargeCoulombs,
    @JsonProperty("highest_e_per_nm2") Optional<Double> highest,
    @JsonProperty("upper_e_per_nm2") Optional<Double> upperHighest,
    @JsonProperty("highest_at_m") Optional<List<Double>> highestAtMetres) {
  /** The answer that says what a report does. */
  public static JobAnswer of(JobReport report) {
    ProgressAnswer progress = ProgressAnswer.of(report.progress());
    DoseAlone dose = report.dose();
    return new JobAnswer(
        progress.id(),
        progress.sample(),
        progress.mode(),
        progress.priority(),
        progress.state(),
        progress.heldFor(),
        progress.because(),
        progress.started(),
        progress.ended(),
        progress.exposures(),
        progress.doneFraction(),
        progress.running(),
        dose.charge().coulombs(),
        dose.upperCharge().coulombs(),
        dose.highest().map(Fluence::electronsPerSquareNanometre),
        dose.upperHighest().map(Fluence::electronsPerSquareNanometre),
        dose.at().map(Places::metres));
  }
}
