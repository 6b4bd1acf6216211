package beamwarden.simulated;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.Point;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.beam.SpotScan;
import beamwarden.instrument.ModeAbility.Boundary;
import java.time.Duration;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;

/** Where the beam is: three lines of ten pixels of 10 ns, with 50 ns of flyback. */
class BeamPathTest {
  private static final RasterScan RASTER =
      new RasterScan(
          Rectangle.of(new Point(0, 0), 10e-6, 3e-6),
          10,
          3,
          0,
          3,
          Duration.ofNanos(10),
          Duration.ofNanos(50));
  private static final Duration SLICE = Duration.ofNanos(40);

  private final BeamPath path = new BeamPath(RASTER, true, 1_000);

  @Test
  void aWholeScanEndsWithItsLastPixelAndIsReadyAfterItsLastFlyback() {
    assertTrue(path.whole());
    assertEquals(400, path.endNanos());
    assertEquals(RASTER.duration().toNanos(), path.readyNanos());
    assertEquals(new BeamPath.Reach(3, 3, 300), path.at(10_000));
  }

  @Test
  void aPartOfALineIsTouchedAndNotDone() {
    assertEquals(new BeamPath.Reach(0, 0, 0), path.at(0));
    assertEquals(new BeamPath.Reach(0, 1, 1), path.at(1));
    assertEquals(new BeamPath.Reach(1, 1, 100), path.at(100));
    assertEquals(new BeamPath.Reach(1, 1, 100), path.at(149));
    assertEquals(new BeamPath.Reach(1, 2, 130), path.at(180));
  }

  @Test
  void aLimitCutsWhereItIsUsedUp() {
    BeamPath cut = new BeamPath(RASTER, true, 130);
    assertFalse(cut.whole());
    assertEquals(180, cut.endNanos());
    assertEquals(180, cut.readyNanos());
    assertEquals(100, new BeamPath(RASTER, true, 100).endNanos());
    assertEquals(0, new BeamPath(RASTER, true, 0).endNanos());
  }

  @Test
  void aLimitCountsFlybackThatIsNotBlanked() {
    BeamPath slow = new BeamPath(RASTER, false, 130);
    assertEquals(new BeamPath.Reach(1, 1, 130), slow.at(1_000));
    assertEquals(new BeamPath.Reach(3, 3, 400), new BeamPath(RASTER, false, 900).at(1_000));
  }

  @Test
  void theBeamIsNeverOnLongerThanTheLimit() {
    SplittableRandom random = new SplittableRandom(3);
    for (int trial = 0; trial < 10_000; trial++) {
      long limit = random.nextLong(500);
      BeamPath any = new BeamPath(RASTER, random.nextBoolean(), limit);
      assertTrue(any.at(random.nextLong(600)).beamOnNanos() <= limit, "limit " + limit);
    }
  }

  @Test
  void aBoundaryIsTheEndOfALineAPixelOrTheScan() {
    assertEquals(100, path.boundaryFrom(37, Boundary.LINE, SLICE));
    assertEquals(120, path.boundaryFrom(120, Boundary.LINE, SLICE));
    assertEquals(250, path.boundaryFrom(151, Boundary.LINE, SLICE));
    assertEquals(40, path.boundaryFrom(37, Boundary.POINT, SLICE));
    assertEquals(400, path.boundaryFrom(37, Boundary.FRAME, SLICE));
  }

  @Test
  void aSpotCountsNanosecondsAndEndsAfterSlices() {
    BeamPath spot = new BeamPath(new SpotScan(new Point(0, 0), Duration.ofNanos(100)), true, 1_000);
    assertEquals(new BeamPath.Reach(37, 37, 37), spot.at(37));
    assertEquals(40, spot.boundaryFrom(37, Boundary.SLICE, SLICE));
    assertEquals(100, spot.boundaryFrom(81, Boundary.SLICE, SLICE));
    assertEquals(100, spot.boundaryFrom(37, Boundary.FRAME, SLICE));
  }
}
