package beamwarden.simulated;

import beamwarden.beam.RasterScan;
import beamwarden.beam.Scan;
import beamwarden.beam.SpotScan;
import beamwarden.instrument.ModeAbility.Boundary;
import java.time.Duration;

/**
 * Where the beam of one scan is at each moment, and how long it has been on: pure arithmetic in
 * whole nanoseconds since the first electron.
 *
 * <p>A spot counts as one line without flyback.
 */
final class BeamPath {
  private final Scan scan;
  private final boolean flybackBlanked;
  private final long lineNanos;
  private final long flybackNanos;
  private final long lines;
  private final long endNanos;

  /**
   * The path of a scan.
   *
   * @param flybackBlanked whether the beam is off between two lines
   * @param limitNanos the beam-on time after which the scan engine turns the beam off by itself
   */
  BeamPath(Scan scan, boolean flybackBlanked, long limitNanos) {
    this.scan = scan;
    this.flybackBlanked = flybackBlanked;
    if (scan instanceof RasterScan raster) {
      this.lineNanos = raster.lineBeamOn().toNanos();
      this.flybackNanos = raster.flyback().toNanos();
      this.lines = raster.rowCount();
    } else {
      this.lineNanos = scan.beamOn().toNanos();
      this.flybackNanos = 0;
      this.lines = 1;
    }
    this.endNanos = endWithin(Math.max(0, limitNanos));
  }

  /** When the beam goes off by itself: after the last pixel, or when the limit is used up. */
  long endNanos() {
    return endNanos;
  }

  /** Whether the limit leaves room for the whole scan. */
  boolean whole() {
    return endNanos == lastPixelNanos();
  }

  /** When the scan engine is ready again: a whole scan flies back once more. */
  long readyNanos() {
    return whole() ? endNanos + flybackNanos : endNanos;
  }

  /** How far the scan is. */
  Reach at(long nanos) {
    long t = clamped(nanos);
    long full = t / period();
    long rest = Math.min(t % period(), lineNanos);
    long done = full + (rest == lineNanos ? 1 : 0);
    long touched = full + (rest > 0 ? 1 : 0);
    if (scan instanceof SpotScan) {
      return new Reach(t, t, t);
    }
    return new Reach(done, touched, beamOnNanos(t));
  }

  /** The beam-on time inside pixels. */
  long pixelNanos(long nanos) {
    long t = clamped(nanos);
    return t / period() * lineNanos + Math.min(t % period(), lineNanos);
  }

  /** The beam-on time, unblanked flyback included. */
  long beamOnNanos(long nanos) {
    return flybackBlanked ? pixelNanos(nanos) : clamped(nanos);
  }

  /**
   * The first moment from {@code nanos} on at which the scan may end and be taken up again.
   *
   * @param longestSlice the longest time slice of the mode, for scans that end after slices
   */
  long boundaryFrom(long nanos, Boundary boundary, Duration longestSlice) {
    long t = clamped(nanos);
    if (scan instanceof RasterScan raster) {
      return switch (boundary) {
        case LINE -> endOfLine(t);
        case POINT -> endOfPixel(t, raster.dwell().toNanos());
        case FRAME, SLICE -> endNanos;
      };
    }
    long slice = longestSlice.toNanos();
    boolean sliced = boundary == Boundary.SLICE && slice > 0;
    return sliced ? Math.min(endNanos, (t + slice - 1) / slice * slice) : endNanos;
  }

  private long endOfLine(long t) {
    long rest = t % period();
    return rest == 0 || rest >= lineNanos ? t : Math.min(endNanos, t - rest + lineNanos);
  }

  private long endOfPixel(long t, long dwell) {
    long rest = t % period();
    return rest >= lineNanos
        ? t
        : Math.min(endNanos, t - rest + (rest + dwell - 1) / dwell * dwell);
  }

  private long endWithin(long limit) {
    if (!flybackBlanked) {
      return Math.min(limit, lastPixelNanos());
    }
    if (limit >= lines * lineNanos) {
      return lastPixelNanos();
    }
    long full = limit / lineNanos;
    long rest = limit % lineNanos;
    return rest == 0 && full > 0 ? (full - 1) * period() + lineNanos : full * period() + rest;
  }

  private long clamped(long nanos) {
    return Math.max(0, Math.min(nanos, endNanos));
  }

  private long lastPixelNanos() {
    return lines * period() - flybackNanos;
  }

  private long period() {
    return lineNanos + flybackNanos;
  }

  /**
   * How far a scan is.
   *
   * @param unitsDone whole units
   * @param unitsTouched units into which any electron went
   * @param beamOnNanos how long the beam has been on
   */
  record Reach(long unitsDone, long unitsTouched, long beamOnNanos) {}
}
