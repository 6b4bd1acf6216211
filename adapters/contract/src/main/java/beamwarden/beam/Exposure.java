package beamwarden.beam;

/**
 * The smallest piece of a job that is granted, done and booked as one.
 *
 * @param job the job's id
 * @param pass which of the job's passes this is a part of, counted from 0 in the order of exposure
 * @param sample the sample's id
 * @param placement where the sample sits on the holder
 * @param conditions what the instrument must be brought to
 * @param scan what the beam does, in sample coordinates
 */
public record Exposure(
    String job, int pass, String sample, Placement placement, Conditions conditions, Scan scan) {
  /** The stage position that brings the middle of the scan under the beam. */
  public Point stageTarget() {
    Point middle =
        scan instanceof RasterScan raster ? raster.frame().centre() : ((SpotScan) scan).at();
    return placement.toStage(middle);
  }
}
