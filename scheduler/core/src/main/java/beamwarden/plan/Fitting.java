package beamwarden.plan;

import beamwarden.beam.Exposure;
import beamwarden.dose.Done;
import beamwarden.dose.Exposures;
import beamwarden.dose.Trim;
import beamwarden.estimate.Timings;
import beamwarden.instrument.Abilities;
import beamwarden.queue.Job;
import beamwarden.queue.Sample;
import beamwarden.shift.Shift;
import java.time.Duration;
import java.time.Instant;
import java.util.Optional;

/**
 * The next exposure of a job that can still be made in a shift: the one rule by which both the walk
 * and the run place exposures.
 *
 * <p>It must end before the shift's wind-down and the job's deadline, start before the shift's
 * latest start, and leave its beam-on budget whole; where a job can be cut, it is cut to fit.
 */
public final class Fitting {
  /** Longer than any exposure. */
  private static final Duration ENDLESS = Duration.ofDays(10_000);

  private final Abilities abilities;

  /** A rule for an instrument. */
  public Fitting(Abilities abilities) {
    this.abilities = abilities;
  }

  /**
   * What a job needs next.
   *
   * @param exposure the exposure
   * @param preparation the time to bring the instrument there
   * @param reading the time to read the current
   * @param exposing the time of the exposure itself
   */
  public record Piece(
      Exposure exposure, Duration preparation, Duration reading, Duration exposing) {
    /** The time before the exposure begins. */
    public Duration before() {
      return preparation.plus(reading);
    }
  }

  /**
   * The next exposure that fits, or empty.
   *
   * @param done what is done of the job
   * @param trim to what it was cut, if it was
   * @param at what the instrument is ready for
   * @param shift the shift
   * @param beamOnUsed how much of the shift's beam-on budget is used
   * @param now from when on
   */
  public Optional<Piece> next(
      Job job,
      Sample sample,
      Done done,
      Optional<Trim> trim,
      Readiness at,
      Shift shift,
      Duration beamOnUsed,
      Instant now) {
    return Exposures.next(job, sample, abilities, done, trim)
        .map(whole -> now.plus(piece(whole, at, now).before()))
        .filter(start -> shift.latestStart().filter(start::isAfter).isEmpty())
        .map(start -> longest(job, shift, beamOnUsed, start))
        .filter(longest -> !longest.isNegative() && !longest.isZero())
        .flatMap(longest -> Exposures.next(job, sample, abilities, done, trim, longest))
        .map(exposure -> piece(exposure, at, now));
  }

  private Duration longest(Job job, Shift shift, Duration beamOnUsed, Instant start) {
    Instant end = job.deadline().filter(shift.usableEnd()::isAfter).orElse(shift.usableEnd());
    Duration left =
        Duration.between(start, end)
            .minus(Timings.frameStart(job.acquisition().mode(), abilities))
            .minus(abilities.blanker().alone().orElse(Duration.ZERO));
    Duration budget = shift.beamOnBudget().map(most -> most.minus(beamOnUsed)).orElse(ENDLESS);
    return left.compareTo(budget) < 0 ? left : budget;
  }

  private Piece piece(Exposure exposure, Readiness at, Instant now) {
    Duration preparation = at.preparation(exposure, abilities);
    Instant start = now.plus(preparation);
    Readiness there = at.isAt(exposure, abilities) ? at : at.preparedFor(exposure);
    Duration reading =
        there.hasReading(exposure, start, abilities)
            ? Duration.ZERO
            : abilities.meter().readingTakes();
    return new Piece(exposure, preparation, reading, Timings.exposure(exposure, abilities));
  }
}
