package beamwarden.run;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Conditions;
import beamwarden.beam.Point;
import java.time.Instant;

/** What the instrument was asked to do between exposures. */
sealed interface Doing {
  /** When an answer is overdue. */
  Instant due();

  /** Nothing. */
  record Nothing() implements Doing {
    @Override
    public Instant due() {
      return Instant.MAX;
    }
  }

  /**
   * It goes to other conditions.
   *
   * @param request the request's number
   * @param job the job for which it does
   * @param conditions where it goes
   * @param stage where the stage goes
   * @param due when an answer is overdue
   */
  record Preparing(long request, String job, Conditions conditions, Point stage, Instant due)
      implements Doing {}

  /**
   * It measures the probe current.
   *
   * @param request the request's number
   * @param job the job for which it does
   * @param settings what the column is set to
   * @param due when an answer is overdue
   */
  record Measuring(long request, String job, BeamSettings settings, Instant due) implements Doing {}

  /**
   * It winds down.
   *
   * @param due when an answer is overdue
   */
  record WindingDown(Instant due) implements Doing {}
}
