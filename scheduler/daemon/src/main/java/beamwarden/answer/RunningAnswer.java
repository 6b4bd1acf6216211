package beamwarden.answer;

import beamwarden.report.RunningExposure;
import com.fasterxml.jackson.annotation.JsonProperty;

/**
 * The exposure that is being made.
 *
 * @param job the id of its job
 * @param grant the number of its grant
 * @param pass which of the job's passes it is a part of, counted from 0
 * @param unitsDone units done so far: lines, or nanoseconds at a point
 * @param units units it has in all
 */
public record RunningAnswer(
    @JsonProperty("job") String job,
    @JsonProperty("grant") long grant,
    @JsonProperty("pass") int pass,
    @JsonProperty("units_done") long unitsDone,
    @JsonProperty("units") long units) {
  static RunningAnswer of(RunningExposure running) {
    return new RunningAnswer(
        running.job(), running.grant(), running.pass(), running.unitsDone(), running.units());
  }
}
