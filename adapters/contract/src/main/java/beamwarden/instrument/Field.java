package beamwarden.instrument;

/**
 * The scan field.
 *
 * @param largestMetres the longest side of a raster, above zero
 * @param calibration how far off a scanned length may be, as a part of it, 0 to below 1 (a
 *     guarantee)
 */
public record Field(double largestMetres, double calibration) {
  /** Refuses a calibration outside 0 to below 1. */
  public Field {
    if (!(calibration >= 0 && calibration < 1)) {
      throw new IllegalArgumentException(
          "a scan calibration must be from 0 to below 1, not " + calibration);
    }
  }
}
