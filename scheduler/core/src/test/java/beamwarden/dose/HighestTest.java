package beamwarden.dose;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.Point;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class HighestTest {
  private static final int SIDE = 24;
  private static final Box ALL = new Box(0, 0, SIDE, SIDE);

  @Test
  void sumsWhatOverlaps() {
    List<Footprint> two =
        List.of(new Footprint(new Box(0, 0, 10, 10), 3), new Footprint(new Box(8, 8, 20, 20), 4));
    assertEquals(
        Optional.of(new Footprint(new Box(8, 8, 10, 10), 7.0)), Highest.of(two, ALL, List.of()));
  }

  @Test
  void doesNotSumWhatSharesAnEdgeOrACorner() {
    List<Footprint> three =
        List.of(
            new Footprint(new Box(0, 0, 10, 10), 3),
            new Footprint(new Box(10, 0, 20, 10), 4),
            new Footprint(new Box(20, 10, 24, 20), 5));
    assertEquals(5, Highest.of(three, ALL, List.of()).orElseThrow().fluence());
  }

  @Test
  void isEmptyWhereNothingWas() {
    assertEquals(Optional.empty(), Highest.of(List.of(), ALL, List.of()));
    assertEquals(
        Optional.empty(),
        Highest.of(List.of(new Footprint(new Box(0, 0, 5, 5), 3)), new Box(5, 0, 9, 9), List.of()));
    assertEquals(
        Optional.empty(),
        Highest.of(List.of(new Footprint(new Box(0, 0, 5, 5), 3)), ALL, List.of(ALL)));
  }

  @Test
  void losesNothingBetweenVeryLargeAndVerySmall() {
    List<Footprint> mixed =
        List.of(
            new Footprint(new Box(0, 0, 5, 5), 1e12),
            new Footprint(new Box(6, 0, 9, 5), 1e-6),
            new Footprint(new Box(8, 0, 12, 5), 2e-6));
    assertEquals(
        3e-6, Highest.of(mixed, new Box(6, 0, 20, 5), List.of()).orElseThrow().fluence(), 1e-18);
    assertEquals(1e12, Highest.of(mixed, ALL, List.of()).orElseThrow().fluence());
  }

  @Test
  void refusesAFluenceThatIsNoNumber() {
    for (double fluence : new double[] {Double.POSITIVE_INFINITY, Double.NaN}) {
      List<Footprint> broken = List.of(new Footprint(new Box(0, 0, 5, 5), fluence));
      assertEquals(
          "a sum of fluences must be a finite number, not " + fluence,
          assertThrows(IllegalStateException.class, () -> Highest.of(broken, ALL, List.of()))
              .getMessage());
    }
  }

  /** Seeds are fixed; fluences are eighths, so that sums are exact in any order. */
  @ParameterizedTest
  @ValueSource(longs = {1, 2, 3, 4, 5})
  void equalsABruteForceRasterOfRectangles(long seed) {
    Random random = new Random(seed);
    for (int round = 0; round < 60; round++) {
      List<Footprint> footprints = new ArrayList<>();
      for (int i = random.nextInt(14); i >= 0; i--) {
        footprints.add(new Footprint(box(random), random.nextInt(1, 800) / 8.0));
      }
      List<Box> exempt = random.nextBoolean() ? List.of() : List.of(box(random), box(random));
      Box window = random.nextBoolean() ? ALL : box(random);
      double expected = bruteForce(footprints, window, exempt);
      Optional<Footprint> highest = Highest.of(footprints, window, exempt);
      assertEquals(expected, highest.map(Footprint::fluence).orElse(0.0), "round " + round);
      highest.ifPresent(cell -> assertTrue(window.contains(cell.box())));
    }
  }

  /** Squares of random spots among rectangles, on a lattice of 1 nm. */
  @ParameterizedTest
  @ValueSource(longs = {11, 12, 13})
  void equalsABruteForceRasterOfRectanglesAndSpots(long seed) {
    Random random = new Random(seed);
    for (int round = 0; round < 10; round++) {
      List<Footprint> footprints = new ArrayList<>();
      for (int i = 0; i < 4; i++) {
        footprints.add(new Footprint(box(random), random.nextDouble() * 100));
      }
      Point at = new Point(random.nextInt(SIDE) * 1e-10, random.nextInt(SIDE) * 1e-10);
      double electrons = random.nextDouble();
      SpotShape spot = new SpotShape(at, electrons, electrons);
      footprints.addAll(spot.footprints(Worth.UPPER, random.nextInt(1, 5) * 4e-10, 0, Axes.SAMPLE));
      double expected = bruteForce(footprints, ALL, List.of());
      double highest = Highest.of(footprints, ALL, List.of()).orElseThrow().fluence();
      assertEquals(1, highest / expected, 1e-12, "round " + round);
    }
  }

  static double bruteForce(List<Footprint> footprints, Box window, List<Box> exempt) {
    double highest = 0;
    for (long x = window.left(); x < window.right(); x++) {
      for (long y = window.bottom(); y < window.top(); y++) {
        Box pixel = new Box(x, y, x + 1, y + 1);
        if (exempt.stream().noneMatch(box -> box.contains(pixel))) {
          double sum = 0;
          for (Footprint footprint : footprints) {
            sum += footprint.box().contains(pixel) ? footprint.fluence() : 0;
          }
          highest = Math.max(highest, sum);
        }
      }
    }
    return highest;
  }

  private static Box box(Random random) {
    int left = random.nextInt(SIDE);
    int bottom = random.nextInt(SIDE);
    return new Box(
        left, bottom, random.nextInt(left + 1, SIDE + 1), random.nextInt(bottom + 1, SIDE + 1));
  }
}
