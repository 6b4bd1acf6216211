package beamwarden.report;

import beamwarden.beam.Mode;
import beamwarden.ledger.JobRecord;
import beamwarden.queue.HeldFor;
import beamwarden.queue.JobState;
import java.time.Instant;
import java.util.Optional;

/**
 * Where a job stands, without its dose: cheap enough to be asked for often.
 *
 * @param id its id
 * @param sample the id of its sample
 * @param mode its mode
 * @param priority its priority
 * @param state its state, {@code ready} told apart from {@code waiting}
 * @param heldFor what it waits for, when it is held
 * @param because why it is in that state; may be empty
 * @param started when its first grant was stored
 * @param ended when it ended
 * @param exposures how many receipts were booked for it
 * @param doneFraction how much of the whole job is done, what is being exposed included; from 0 to
 *     1
 * @param running the exposure that is being made for it, if one is
 */
public record JobProgress(
    String id,
    String sample,
    Mode mode,
    int priority,
    JobState state,
    Optional<HeldFor> heldFor,
    String because,
    Optional<Instant> started,
    Optional<Instant> ended,
    int exposures,
    double doneFraction,
    Optional<RunningExposure> running) {
  static JobProgress of(
      JobRecord record, JobState state, double doneFraction, Optional<RunningExposure> running) {
    return new JobProgress(
        record.job().id(),
        record.job().sample(),
        record.job().acquisition().mode(),
        record.job().priority(),
        state,
        record.heldFor(),
        record.because(),
        record.started(),
        record.ended(),
        record.exposures(),
        doneFraction,
        running);
  }
}
