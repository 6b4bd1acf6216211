package beamwarden.simulated;

import static org.junit.jupiter.api.Assertions.assertEquals;

import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.beam.Scan;
import beamwarden.beam.SpotScan;
import java.time.Duration;
import java.util.List;
import org.junit.jupiter.api.Test;

/** Where electrons truly land, against geometry done by hand. */
class TrueScanTest {
  private static final RasterScan RASTER =
      new RasterScan(
          new Rectangle(new Point(10e-6, 0), 20e-6, 10e-6, 90),
          100,
          10,
          2,
          4,
          Duration.ofNanos(100),
          Duration.ofNanos(500));

  @Test
  void linesLieInTheTurnedFrame() {
    Stretch lines = stretches(RASTER, new Point(0, 0), 1, 0, 42_000).get(0);
    // Lines 2 to 5 of 10 from the top: their middle is 1 um above the frame's, which after a turn
    // by 90 degrees is 1 um to the left.
    assertEquals(9e-6, lines.centre().xMetres(), 1e-15);
    assertEquals(0, lines.centre().yMetres(), 1e-15);
    assertEquals(20e-6, lines.widthMetres(), 1e-15);
    assertEquals(4e-6, lines.heightMetres(), 1e-15);
    assertEquals(90, lines.turnDegrees());
  }

  @Test
  void aGainStretchesAboutTheMiddleOfTheFrame() {
    Stretch lines = stretches(RASTER, new Point(0, 0), 1.02, 0, 42_000).get(0);
    assertEquals(10e-6 - 1.02e-6, lines.centre().xMetres(), 1e-15);
    assertEquals(20.4e-6, lines.widthMetres(), 1e-15);
    assertEquals(4.08e-6, lines.heightMetres(), 1e-15);
  }

  @Test
  void aStageErrorIsTurnedIntoTheSamplesAxes() {
    // The sample is turned by 90 degrees on the holder: a stage error along x lies along its -y.
    Stretch lines = stretches(RASTER, new Point(2e-6, 0), 1, 0, 42_000).get(0);
    assertEquals(9e-6, lines.centre().xMetres(), 1e-15);
    assertEquals(-2e-6, lines.centre().yMetres(), 1e-15);
  }

  @Test
  void partsOfLinesAreRectanglesOfTheirOwn() {
    // From the middle of the first line to a quarter of the fourth.
    List<Stretch> parts = stretches(RASTER, new Point(0, 0), 1, 5_000, 3 * 10_500 + 2_500);
    assertEquals(3, parts.size());
    assertEquals(10e-6, parts.get(0).widthMetres(), 1e-15);
    assertEquals(2e-6, parts.get(1).heightMetres(), 1e-15);
    assertEquals(5e-6, parts.get(2).widthMetres(), 1e-15);
    double electrons = parts.stream().mapToDouble(Stretch::electrons).sum();
    assertEquals(1e-9 * 27_500e-9 / 1.602176634e-19, electrons, 1e-3);
    // Equal fluence in every part.
    double fluence = parts.get(1).electrons() / (20e-6 * 2e-6);
    assertEquals(fluence, parts.get(0).electrons() / (10e-6 * 1e-6), 1e-9 * fluence);
    assertEquals(fluence, parts.get(2).electrons() / (5e-6 * 1e-6), 1e-9 * fluence);
  }

  @Test
  void aStretchBeginsAndEndsWithItsElectrons() {
    Stretch lines = stretches(RASTER, new Point(0, 0), 1, 0, 21_000).get(0);
    assertEquals(Session.EVENING, lines.began());
    assertEquals(Session.EVENING.plusNanos(20_500), lines.ended());
  }

  @Test
  void aSpotHasTheProbesDiameter() {
    SpotScan scan = new SpotScan(new Point(1e-6, 2e-6), Duration.ofSeconds(1));
    Stretch spot = stretches(scan, new Point(0, 0), 1.02, 0, 1_000_000_000).get(0);
    assertEquals(new Point(1e-6, 2e-6), spot.centre());
    assertEquals(6e-9, spot.widthMetres());
    // 1 nA for 1 s: 6.241509e9 electrons (SI Brochure, 9th edition, by way of e).
    assertEquals(6.241509e9, spot.electrons(), 5e2);
  }

  private static List<Stretch> stretches(
      Scan scan, Point stageError, double gain, long from, long to) {
    Placement placement = new Placement(new Point(0, 0), 90, 0);
    Run run = new Run(1, 1, "abs-3", placement, scan, Long.MAX_VALUE, Session.EVENING);
    return new TrueScan(run, run.path(true), stageError, gain, gain, 6e-9)
        .stretches(from, to, 1e-9);
  }
}
