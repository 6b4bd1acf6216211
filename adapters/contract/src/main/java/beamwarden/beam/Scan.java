package beamwarden.beam;

import java.time.Duration;

/**
 * What the beam does in one exposure: {@linkplain RasterScan some lines of a raster} or {@linkplain
 * SpotScan a rest at a point}.
 *
 * <p>A scan is counted in <em>units</em>: lines of a raster, or nanoseconds at a point.
 */
public sealed interface Scan permits RasterScan, SpotScan {
  /** How long the beam is on when the scan runs to its end and is blanked outside its pixels. */
  Duration beamOn();

  /** How long the scan takes, the blanked times between its lines included. */
  Duration duration();

  /** How many units it has, at least 1. */
  long units();
}
