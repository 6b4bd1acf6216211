package beamwarden.answer;

import beamwarden.dose.Done;
import beamwarden.dose.Exposures;
import beamwarden.dose.JobDose;
import beamwarden.dose.Work;
import beamwarden.instrument.Abilities;
import beamwarden.plan.Advice;
import beamwarden.plan.JobCheck;
import beamwarden.plan.Walk;
import com.fasterxml.jackson.annotation.JsonProperty;
import java.time.Instant;
import java.util.List;
import java.util.Optional;

/**
 * What a check says of one job.
 *
 * @param id its id
 * @param sample the id of its sample
 * @param mode its mode
 * @param durationSeconds how long it takes, preparations and readings included; without them when
 *     it is not exposed
 * @param exposures how many exposures it is
 * @param chargeCoulombs the best value of its charge
 * @param upperChargeCoulombs the upper value of it
 * @param mean the mean fluence of a tile in e/nm2, all its passes together
 * @param highest the best value of its highest local fluence in e/nm2; null when unknown
 * @param upper the upper value of it
 * @param highestAtMetres where it is highest
 * @param verdict fits, trimmed, refused or held
 * @param why why it does not fit whole; empty when it does
 * @param advice what would make it fit
 * @param starts when the instrument first turns to it; null when it is not exposed
 * @param ends when its last exposure ends
 * @param shift when the shift of its first exposure opens
 * @param setUpSeconds preparations and readings for it
 */
public record JobCheckAnswer(
    @JsonProperty("id") String id,
    @JsonProperty("sample") String sample,
    @JsonProperty("mode") String mode,
    @JsonProperty("duration_s") double durationSeconds,
    @JsonProperty("exposures") int exposures,
    @JsonProperty("charge_C") double chargeCoulombs,
    @JsonProperty("upper_charge_C") double upperChargeCoulombs,
    @JsonProperty("mean_e_per_nm2") double mean,
    @JsonProperty("highest_e_per_nm2") Optional<Double> highest,
    @JsonProperty("upper_e_per_nm2") Optional<Double> upper,
    @JsonProperty("highest_at_m") Optional<List<Double>> highestAtMetres,
    @JsonProperty("verdict") String verdict,
    @JsonProperty("why") String why,
    @JsonProperty("advice") List<String> advice,
    @JsonProperty("starts") Optional<Instant> starts,
    @JsonProperty("ends") Optional<Instant> ends,
    @JsonProperty("shift") Optional<Instant> shift,
    @JsonProperty("setup_s") double setUpSeconds) {
  static JobCheckAnswer of(JobCheck check, Abilities abilities) {
    JobDose dose = check.dose();
    Optional<Walk.Visit> visit = check.visit();
    Work whole = Exposures.remaining(check.job(), abilities, Done.NOTHING, Optional.empty());
    return new JobCheckAnswer(
        check.job().id(),
        check.job().sample(),
        check.job().acquisition().mode().text(),
        visit
            .map(found -> GrantAnswer.seconds(found.setUp().plus(found.exposing())))
            .orElse(GrantAnswer.seconds(whole.duration())),
        visit.map(Walk.Visit::exposures).orElse(whole.exposures()),
        dose.best().coulombs(),
        dose.upper().coulombs(),
        dose.mean().electronsPerSquareNanometre(),
        dose.highest().map(found -> found.fluence().electronsPerSquareNanometre()),
        dose.highestUpper().map(found -> found.fluence().electronsPerSquareNanometre()),
        dose.highest().map(found -> Places.metres(found.at())),
        check.verdict().text(),
        check.why(),
        Advice.of(check),
        visit.map(Walk.Visit::starts),
        visit.map(Walk.Visit::ends),
        visit.map(Walk.Visit::shift),
        visit.map(found -> GrantAnswer.seconds(found.setUp())).orElse(0.0));
  }
}
