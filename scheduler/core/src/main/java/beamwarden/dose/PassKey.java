package beamwarden.dose;

import beamwarden.beam.Conditions;
import beamwarden.beam.Exposure;
import beamwarden.beam.Placement;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Scan;
import beamwarden.beam.SpotScan;
import java.time.Duration;

/**
 * What deliveries must share to be parts of one pass, without a move of the stage between them.
 *
 * @param job the job
 * @param pass the number of the pass in the job
 * @param stay the stretch without a move of the stage
 * @param placement where the sample was taken to sit
 * @param conditions what the instrument was set to
 * @param tolerances what it guaranteed
 * @param whole the scan of which they are parts: the whole raster, or the point
 */
record PassKey(
    String job,
    int pass,
    long stay,
    Placement placement,
    Conditions conditions,
    Tolerances tolerances,
    Scan whole) {
  /** The key of a delivery. */
  static PassKey of(Delivery delivery) {
    Exposure exposure = delivery.exposure();
    return new PassKey(
        exposure.job(),
        exposure.pass(),
        delivery.stay(),
        exposure.placement(),
        exposure.conditions(),
        delivery.tolerances(),
        whole(exposure.scan()));
  }

  private static Scan whole(Scan part) {
    if (part instanceof RasterScan raster) {
      return new RasterScan(
          raster.frame(),
          raster.columns(),
          raster.rows(),
          0,
          raster.rows(),
          raster.dwell(),
          raster.flyback());
    }
    return new SpotScan(((SpotScan) part).at(), Duration.ofNanos(1));
  }

  /**
   * How far off the pass may lie on the sample, the scan's calibration apart: where the stage
   * stops, and when it was made under another placement than the present one, how far off either
   * may be.
   */
  double offsetMetres(Placement present) {
    return placement.equals(present)
        ? tolerances.repeatabilityMetres()
        : tolerances.repeatabilityMetres()
            + tolerances.placementMetres()
            + present.uncertaintyMetres();
  }
}
