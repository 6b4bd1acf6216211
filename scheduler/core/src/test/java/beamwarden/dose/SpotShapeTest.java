package beamwarden.dose;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.Point;
import beamwarden.physics.GaussianSpot;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;

class SpotShapeTest {
  private static final double SIGMA = 500e-9;
  private static final Point AT = Fixtures.point(3, -4);
  private static final double HIGHEST = new GaussianSpot(SIGMA).highest(1e9);
  private static final SpotShape SPOT = new SpotShape(AT, 0.9e9, 1e9);

  @Test
  void isTheGaussiansHighestInTheMiddle() {
    assertEquals(1, at(squares(0), AT) / HIGHEST, 1e-14);
    assertEquals(0.9, at(SPOT.footprints(Worth.BEST, SIGMA, 0, Axes.SAMPLE), AT) / HIGHEST, 1e-14);
  }

  @Test
  void isNowhereBelowTheGaussianAndNowhereFarAboveIt() {
    List<Footprint> squares = squares(0);
    double mostAlong = 0;
    double most = 0;
    for (double x = 0; x < 8; x += 0.0501) {
      for (double y = 0; y < 8; y += 0.0501) {
        double sum = at(squares, AT.plus(x * SIGMA, y * SIGMA)) / HIGHEST;
        double gaussian = Math.exp(-(x * x + y * y) / 2);
        assertTrue(sum >= gaussian * (1 - 1e-12), "at " + x + ", " + y);
        most = Math.max(most, sum - gaussian);
        mostAlong = y == 0 ? Math.max(mostAlong, sum - gaussian) : mostAlong;
      }
    }
    assertTrue(mostAlong < 0.15, "along " + mostAlong);
    assertTrue(most < 0.39, "anywhere " + most);
  }

  /** Wherever within its uncertainty the point truly lies. Seed fixed. */
  @Test
  void coversTheGaussianOfAnyPointWithinTheUncertainty() {
    Random random = new Random(5);
    double uncertainty = 700e-9;
    List<Footprint> squares = squares(uncertainty);
    for (int round = 0; round < 2000; round++) {
      double direction = random.nextDouble() * 2 * Math.PI;
      double off = uncertainty * Math.sqrt(random.nextDouble());
      Point truly = AT.plus(off * Math.cos(direction), off * Math.sin(direction));
      Point place = truly.plus(random.nextGaussian() * SIGMA, random.nextGaussian() * SIGMA);
      double gaussian = new GaussianSpot(SIGMA).falloff(place.distanceMetres(truly));
      assertTrue(at(squares, place) / HIGHEST >= gaussian * (1 - 1e-12), "round " + round);
    }
  }

  @Test
  void leavesOutLessThanAPartIn10To13() {
    assertTrue(new GaussianSpot(SIGMA).falloff(8 * SIGMA) < 2e-14);
  }

  private static List<Footprint> squares(double uncertainty) {
    return SPOT.footprints(Worth.UPPER, SIGMA, uncertainty, Axes.SAMPLE);
  }

  private static double at(List<Footprint> footprints, Point place) {
    Box pixel = Box.square(place, 0, Axes.SAMPLE);
    return Highest.sum(footprints, pixel);
  }
}
