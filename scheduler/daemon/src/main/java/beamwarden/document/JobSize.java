package beamwarden.document;

import beamwarden.beam.Mosaic;
import beamwarden.beam.Points;
import beamwarden.beam.Region;
import beamwarden.queue.Acquisition;
import java.time.Duration;

/** Refuses jobs that no instrument could end, most likely a slip in a unit or a zero too many. */
final class JobSize {
  private final Problems problems;

  JobSize(Problems problems) {
    this.problems = problems;
  }

  /** Reports too many passes or too long a beam-on time at the key that begins the job's size. */
  void check(Fields fields, Acquisition acquisition, Region region) {
    long places = places(region);
    boolean raster = acquisition instanceof Acquisition.Raster;
    long passes = raster ? places * frames((Acquisition.Raster) acquisition) : places;
    Node place = fields.get(raster ? "dwell" : "until").orElse(fields.group());
    if (passes > Limits.PASSES) {
      problems.error(
          place,
          "this job makes " + passes + " passes, more than the " + Limits.PASSES + " of any job",
          "ask for fewer frames or tiles, or share them out to several jobs");
      return;
    }
    Duration one = onePass(acquisition);
    if (one.multipliedBy(passes).compareTo(Limits.BEAM_ON) > 0) {
      problems.error(
          place,
          "this job keeps the beam on for "
              + Printed.time(one.multipliedBy(passes))
              + ", more than the "
              + Printed.time(Limits.BEAM_ON)
              + " of any job",
          "ask for less time, fewer pixels or fewer frames");
    }
  }

  private static long frames(Acquisition.Raster raster) {
    return (long) raster.frames() * raster.filters().size();
  }

  private static long places(Region region) {
    if (region instanceof Mosaic mosaic) {
      return (long) mosaic.columns() * mosaic.rows();
    }
    return region instanceof Points points ? points.places().size() : 1;
  }

  private static Duration onePass(Acquisition acquisition) {
    return acquisition instanceof Acquisition.Raster raster
        ? raster.dwell().multipliedBy((long) raster.columns() * raster.rows())
        : ((Acquisition.Spot) acquisition).longest();
  }
}
