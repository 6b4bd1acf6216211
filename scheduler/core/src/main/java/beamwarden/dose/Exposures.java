package beamwarden.dose;

import beamwarden.beam.Conditions;
import beamwarden.beam.Exposure;
import beamwarden.beam.Mosaic;
import beamwarden.beam.Points;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.beam.Scan;
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
  private final ModeAbility ability;
  private final List<Scan> places;
  private final List<String> filters;
  private final int frames;
  private final int framesKept;
  private final long units;

  private Exposures(Job job, Abilities abilities, Optional<Trim> limit) {
    this.job = job;
    ability = ability(job, abilities);
    places = places(job, ability.flyback());
    filters = filters(job);
    frames = frames(job);
    framesKept = limit.map(cut -> cut.passes() / (places.size() * filters.size())).orElse(frames);
    long whole = places.get(0).units();
    units = limit.map(cut -> Math.min(whole, cut.unitsPerPass())).orElse(whole);
  }

  /** How many passes a job makes when it is not trimmed. */
  public static int passes(Job job) {
    return places(job, Duration.ZERO).size() * frames(job) * filters(job).size();
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
    for (int number = 0; number < passes(); number++) {
      long left = left(number, done);
      if (left > 0) {
        Pass pass = pass(number);
        long count = count(pass, left, longest);
        return count == 0
            ? Optional.empty()
            : Optional.of(exposure(sample, pass, units - left, count));
      }
    }
    return Optional.empty();
  }

  private Work remaining(Done done) {
    Work work = Work.NONE;
    for (int number = 0; number < passes(); number++) {
      long left = left(number, done);
      if (left > 0) {
        Pass pass = pass(number);
        Scan scan = pass.part(units - left, left);
        int parts = Math.toIntExact(ceiling(left, usual(pass)));
        work = work.plus(new Work(left, scan.beamOn(), scan.duration(), parts, 1));
      }
    }
    return work;
  }

  private Exposure exposure(Sample sample, Pass pass, long first, long count) {
    return new Exposure(
        job.id(),
        pass.number(),
        sample.id(),
        sample.placement(),
        new Conditions(job.beam(), job.acquisition().mode(), pass.filter()),
        pass.part(first, count));
  }

  private int passes() {
    return places.size() * frames * filters.size();
  }

  private Pass pass(int number) {
    if (number < 0 || number >= passes()) {
      throw new IllegalArgumentException(
          "job " + job.id() + " has " + passes() + " passes, none with number " + number);
    }
    int place = number / (frames * filters.size());
    return new Pass(number, place, filters.get(number % filters.size()), places.get(place));
  }

  /** The units of a pass that are to be done and are not; a trimmed job keeps its first frames. */
  private long left(int number, Done done) {
    boolean kept = number / filters.size() % frames < framesKept;
    return kept ? Math.max(0, units - done.units(number)) : 0;
  }

  /** How many of the units that are left the next exposure takes; 0 when none fits. */
  private long count(Pass pass, long left, Optional<Duration> longest) {
    long alike = ceiling(left, ceiling(left, usual(pass)));
    long fitting = longest.map(time -> Math.max(0, time.toNanos()) / unitNanos(pass)).orElse(alike);
    return fitting < Math.min(left, least(pass)) ? 0 : Math.min(alike, fitting);
  }

  /** The fewest units worth an exposure: a line, or the shortest slice at a point. */
  private long least(Pass pass) {
    return pass.whole() instanceof RasterScan ? 1 : Math.max(1, ability.shortestDwell().toNanos());
  }

  /** As many units as usual; a slice at a point is no longer than the mode's longest. */
  private long usual(Pass pass) {
    long most = USUAL_LENGTH.toNanos();
    boolean slices = pass.whole() instanceof SpotScan;
    long longest = slices ? Math.min(most, ability.longestDwell().toNanos()) : most;
    return Math.max(1, longest / unitNanos(pass));
  }

  private static long unitNanos(Pass pass) {
    return pass.part(0, 1).duration().toNanos();
  }

  private static long ceiling(long dividend, long divisor) {
    return (dividend + divisor - 1) / divisor;
  }

  private static ModeAbility ability(Job job, Abilities abilities) {
    return Optional.ofNullable(abilities.modes().get(job.acquisition().mode()))
        .orElseThrow(
            () ->
                new IllegalArgumentException(
                    "job %s needs the mode %s, which the instrument %s does not offer"
                        .formatted(
                            job.id(), job.acquisition().mode().text(), abilities.instrument())));
  }

  private static List<String> filters(Job job) {
    return job.acquisition() instanceof Acquisition.Raster raster
        ? raster.filters()
        : List.of(Conditions.PANCHROMATIC);
  }

  private static int frames(Job job) {
    return job.acquisition() instanceof Acquisition.Raster raster ? raster.frames() : 1;
  }

  /** What one pass scans at each tile or point. */
  private static List<Scan> places(Job job, Duration flyback) {
    if (job.acquisition() instanceof Acquisition.Raster raster) {
      return tiles(job).stream().map(tile -> scan(raster, tile, flyback)).toList();
    }
    if (job.region() instanceof Points points) {
      Duration longest = ((Acquisition.Spot) job.acquisition()).longest();
      return points.places().stream().map(at -> (Scan) new SpotScan(at, longest)).toList();
    }
    throw unfit(job, "a rest of the beam needs points");
  }

  private static Scan scan(Acquisition.Raster raster, Rectangle tile, Duration flyback) {
    return new RasterScan(
        tile, raster.columns(), raster.rows(), 0, raster.rows(), raster.dwell(), flyback);
  }

  private static List<Rectangle> tiles(Job job) {
    if (job.region() instanceof Rectangle rectangle) {
      return List.of(rectangle);
    }
    if (job.region() instanceof Mosaic mosaic) {
      return mosaic.tiles();
    }
    throw unfit(job, "a raster needs a rectangle or a mosaic");
  }

  private static IllegalArgumentException unfit(Job job, String need) {
    String region = job.region().getClass().getSimpleName().toLowerCase(Locale.ROOT);
    return new IllegalArgumentException(
        "job %s cannot be exposed: %s as its region, not a %s".formatted(job.id(), need, region));
  }
}
