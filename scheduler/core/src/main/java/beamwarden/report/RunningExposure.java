package beamwarden.report;

import beamwarden.beam.Exposure;
import beamwarden.run.Exposing;

/**
 * The exposure that is being made.
 *
 * @param job the id of its job
 * @param grant the number of its grant
 * @param pass which of the job's passes it is a part of, counted from 0
 * @param unitsDone units done so far: lines, or nanoseconds at a point
 * @param units units it has in all
 */
public record RunningExposure(String job, long grant, int pass, long unitsDone, long units) {
  static RunningExposure of(Exposing exposing) {
    Exposure exposure = exposing.opened().exposure();
    return new RunningExposure(
        exposure.job(),
        exposing.opened().grant(),
        exposure.pass(),
        exposing.unitsDone(),
        exposure.scan().units());
  }
}
