package beamwarden.dose;

import beamwarden.beam.Point;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.beam.Scan;
import beamwarden.beam.SpotScan;
import java.time.Duration;
import java.util.Optional;

/**
 * One pass of a job.
 *
 * @param number its number in the job, from 0 on
 * @param place which tile or point it is at, from 0 on
 * @param filter the name of its filter, or panchromatic
 * @param whole all of it, as one scan
 */
public record Pass(int number, int place, String filter, Scan whole) {
  /** The outline of the whole raster; empty for a point. */
  public Optional<Rectangle> frame() {
    return whole instanceof RasterScan raster ? Optional.of(raster.frame()) : Optional.empty();
  }

  /** Where the stage brings the sample for it: the middle of the raster, or the point. */
  public Point middle() {
    return whole instanceof RasterScan raster ? raster.frame().centre() : ((SpotScan) whole).at();
  }

  /** Some of its units as a scan of their own. */
  Scan part(long first, long count) {
    if (whole instanceof RasterScan raster) {
      return new RasterScan(
          raster.frame(),
          raster.columns(),
          raster.rows(),
          Math.toIntExact(first),
          Math.toIntExact(count),
          raster.dwell(),
          raster.flyback());
    }
    return new SpotScan(((SpotScan) whole).at(), Duration.ofNanos(count));
  }
}
