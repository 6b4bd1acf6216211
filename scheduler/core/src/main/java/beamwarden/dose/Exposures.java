package beamwarden.dose;

import beamwarden.beam.Conditions;
import beamwarden.beam.Exposure;
import beamwarden.beam.Mosaic;
import beamwarden.beam.Point;
import beamwarden.beam.Points;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.beam.SpotScan;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.ModeAbility;
import beamwarden.queue.Acquisition;
import beamwarden.queue.Job;
import beamwarden.queue.Sample;
import java.time.Duration;
import java.util.List;
import java.util.Locale;
import java.util.Optional;

/**
 * Cuts a job into exposures: the one place that says which, used by check, plan, rehearsal and run.
 *
 * <p>A raster job makes one pass for each tile of its region, for each frame, for each filter, in
 * that order: pass = (tile·frames + frame)·filters + filter. A spot job makes one pass at each
 * point. A pass is cut into exposures of whole units that last about {@link #USUAL_LENGTH} at most
 * and are alike in length, since the time to blank weighs most on a short one.
 */
public final class Exposures {
  /** How long an exposure lasts at most, unless a single line takes longer. */
  public static final Duration USUAL_LENGTH = Duration.ofSeconds(60);

  private final Job job;
  private final Abilities abilities;
  private final Optional<Trim> limit;
  private final List<Rectangle> tiles;
  private final List<Point> points;
  private final int passes;

  private Exposures(Job job, Abilities abilities, Optional<Trim> limit) {
    this.job = job;
    this.abilities = abilities;
    this.limit = limit;
    this.tiles = tiles(job);
    this.points = points(job);
    this.passes = passes(job, tiles.size() + points.size());
  }

  /** How many passes a job makes when it is not trimmed. */
  public static int passes(Job job) {
    return passes(job, tiles(job).size() + points(job).size());
  }

  private static int passes(Job job, int places) {
    return job.acquisition() instanceof Acquisition.Raster raster
        ? places * raster.frames() * raster.filters().size()
        : places;
  }

  /**
   * One pass of a job.
   *
   * @throws IllegalArgumentException when the job has no such pass, or the instrument does not
   *     offer its mode
   */
  public static Pass pass(Job job, int number, Abilities abilities) {
    return new Exposures(job, abilities, Optional.empty()).pass(number);
  }

  /** The next exposure of a job; empty when all of it is done. */
  public static Optional<Exposure> next(
      Job job, Sample sample, Abilities abilities, Done done, Optional<Trim> limit) {
    return new Exposures(job, abilities, limit).next(sample, done, Optional.empty());
  }

  /**
   * The next exposure of a job that takes no longer than {@code longest}; empty when all of it is
   * done, and when not even one line fits.
   */
  public static Optional<Exposure> next(
      Job job,
      Sample sample,
      Abilities abilities,
      Done done,
      Optional<Trim> limit,
      Duration longest) {
    return new Exposures(job, abilities, limit).next(sample, done, Optional.of(longest));
  }

  /** What is left to do of a job. */
  public static Work remaining(Job job, Abilities abilities, Done done, Optional<Trim> limit) {
    return new Exposures(job, abilities, limit).remaining(done);
  }

  private Optional<Exposure> next(Sample sample, Done done, Optional<Duration> longest) {
    for (int number = 0; number < passes; number++) {
      if (kept(number) && done.units(number) < units()) {
        Pass pass = pass(number);
        long count = count(pass, units() - done.units(number), longest);
        return count == 0
            ? Optional.empty()
            : Optional.of(exposure(sample, pass, done.units(number), count));
      }
    }
    return Optional.empty();
  }

  private Work remaining(Done done) {
    Work work = Work.NONE;
    for (int number = 0; number < passes; number++) {
      long left = kept(number) ? units() - done.units(number) : 0;
      if (left > 0) {
        Pass pass = pass(number);
        var scan = pass.part(done.units(number), left);
        int parts = Math.toIntExact(ceiling(left, usual(pass)));
        work = work.plus(new Work(left, scan.beamOn(), scan.duration(), parts, 1));
      }
    }
    return work;
  }

  private Exposure exposure(Sample sample, Pass pass, long first, long count) {
    Conditions conditions = new Conditions(job.beam(), job.acquisition().mode(), pass.filter());
    return new Exposure(
        job.id(),
        pass.number(),
        sample.id(),
        sample.placement(),
        conditions,
        pass.part(first, count));
  }

  private Pass pass(int number) {
    if (number < 0 || number >= passes) {
      throw new IllegalArgumentException(
          "job " + job.id() + " has " + passes + " passes, none with number " + number);
    }
    if (job.acquisition() instanceof Acquisition.Raster raster) {
      int place = number / (raster.frames() * raster.filters().size());
      String filter = raster.filters().get(number % raster.filters().size());
      return new Pass(number, place, filter, scan(raster, tiles.get(place)));
    }
    return new Pass(
        number,
        number,
        Conditions.PANCHROMATIC,
        new SpotScan(points.get(number), ((Acquisition.Spot) job.acquisition()).longest()));
  }

  private RasterScan scan(Acquisition.Raster raster, Rectangle tile) {
    Duration flyback = ability().flyback();
    return new RasterScan(
        tile, raster.columns(), raster.rows(), 0, raster.rows(), raster.dwell(), flyback);
  }

  /** Whether a trimmed job still makes a pass: the first frames of every tile remain. */
  private boolean kept(int number) {
    if (limit.isEmpty() || !(job.acquisition() instanceof Acquisition.Raster raster)) {
      return true;
    }
    int filters = raster.filters().size();
    return number / filters % raster.frames() < limit.get().passes() / (tiles.size() * filters);
  }

  /** The units of each pass that are to be done. */
  private long units() {
    long all =
        job.acquisition() instanceof Acquisition.Raster raster
            ? raster.rows()
            : ((Acquisition.Spot) job.acquisition()).longest().toNanos();
    return limit.map(trim -> Math.min(all, trim.unitsPerPass())).orElse(all);
  }

  /** How many of the units that are left the next exposure takes; 0 when none fits. */
  private long count(Pass pass, long left, Optional<Duration> longest) {
    long alike = ceiling(left, ceiling(left, usual(pass)));
    if (longest.isEmpty()) {
      return alike;
    }
    long fitting = Math.max(0, longest.get().toNanos()) / unitNanos(pass);
    return fitting >= alike || fitting >= least(left) ? Math.min(alike, fitting) : 0;
  }

  /** The fewest units worth an exposure: a line, or the shortest slice at a point. */
  private long least(long left) {
    return job.acquisition() instanceof Acquisition.Raster
        ? 1
        : Math.min(left, Math.max(1, ability().shortestDwell().toNanos()));
  }

  /** As many units as usual; a slice at a point is no longer than the mode's longest. */
  private long usual(Pass pass) {
    boolean slices = job.acquisition() instanceof Acquisition.Spot;
    long most = USUAL_LENGTH.toNanos();
    long longest = slices ? Math.min(most, ability().longestDwell().toNanos()) : most;
    return Math.max(1, longest / unitNanos(pass));
  }

  private static long unitNanos(Pass pass) {
    return pass.part(0, 1).duration().toNanos();
  }

  private static long ceiling(long dividend, long divisor) {
    return (dividend + divisor - 1) / divisor;
  }

  private ModeAbility ability() {
    ModeAbility ability = abilities.modes().get(job.acquisition().mode());
    if (ability == null) {
      throw new IllegalArgumentException(
          "job "
              + job.id()
              + " needs the mode "
              + job.acquisition().mode().text()
              + ", which the instrument "
              + abilities.instrument()
              + " does not offer");
    }
    return ability;
  }

  private static List<Rectangle> tiles(Job job) {
    if (!(job.acquisition() instanceof Acquisition.Raster)) {
      return List.of();
    }
    if (job.region() instanceof Rectangle rectangle) {
      return List.of(rectangle);
    }
    if (job.region() instanceof Mosaic mosaic) {
      return mosaic.tiles();
    }
    throw unfit(job, "a raster needs a rectangle or a mosaic");
  }

  private static List<Point> points(Job job) {
    if (job.acquisition() instanceof Acquisition.Raster) {
      return List.of();
    }
    if (job.region() instanceof Points places) {
      return places.places();
    }
    throw unfit(job, "a rest of the beam needs points");
  }

  private static IllegalArgumentException unfit(Job job, String need) {
    return new IllegalArgumentException(
        "job "
            + job.id()
            + " cannot be exposed: "
            + need
            + " as its region, not a "
            + job.region().getClass().getSimpleName().toLowerCase(Locale.ROOT));
  }
}
