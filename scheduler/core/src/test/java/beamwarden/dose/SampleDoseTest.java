package beamwarden.dose;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.Exposure;
import beamwarden.beam.Mosaic;
import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.Rectangle;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import beamwarden.quantity.Current;
import beamwarden.queue.Averaging;
import beamwarden.queue.Job;
import java.time.Duration;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;

class SampleDoseTest {
  private static final SampleDose NOTHING = SampleDose.nothing(Fixtures.PLACED);
  private static final Abilities INSTRUMENT =
      Fixtures.instrument(0.02, 2e-6, 0.1, Blanker.Kind.FAST, Duration.ZERO);
  private static final Rectangle FRAME = Fixtures.square(0, 0, 20, 20);
  private static final double MEAN_OF_ONE = 1e-9 * 40e-6 / 1.602176634e-19 / (200.0 * 200.0);

  /** Upper over best of the usual instrument: drift, meter, floor, and calibration twice. */
  private static final double UPPER = (1.03 + 0.0002) * 1.1 / (0.98 * 0.98);

  @Nested
  class PartsOfOnePass {
    @Test
    void doNotAddAtTheirJoins() {
      SampleDose dose = NOTHING.plus(lines(1, 7, 0, 0, 30)).plus(lines(2, 7, 0, 30, 70));
      assertUpper(MEAN_OF_ONE * UPPER, dose);
    }

    @Test
    void countAtTheLargerCurrentTogether() {
      Delivery stronger = atCurrent(lines(2, 7, 0, 30, 70), new Current(1.05e-9));
      SampleDose dose = NOTHING.plus(lines(1, 7, 0, 0, 30)).plus(stronger);
      assertUpper(stronger.upperCurrent().amperes() / 1e-9 * MEAN_OF_ONE / (0.98 * 0.98), dose);
      assertEquals(1, dose.passes().size());
    }

    @Test
    void addWhereALineWasExposedAgain() {
      Delivery aborted = touching(lines(1, 7, 0, 0, 30), 11);
      SampleDose dose = NOTHING.plus(aborted).plus(lines(2, 7, 0, 10, 90));
      assertUpper(2 * MEAN_OF_ONE * UPPER, dose);
    }

    @Test
    void addAtTheirJoinAfterAMoveOfTheStage() {
      SampleDose dose = NOTHING.plus(lines(1, 7, 0, 0, 30)).plus(lines(2, 8, 0, 30, 70));
      assertUpper(2 * MEAN_OF_ONE * UPPER, dose);
    }

    @Test
    void giveNothingWhenNoLineWasTouched() {
      Delivery unused = touching(lines(1, 7, 0, 0, 30), 0);
      assertEquals(Optional.empty(), highest(NOTHING.plus(unused), Worth.UPPER));
    }
  }

  @Test
  void passesAdd() {
    SampleDose dose = NOTHING.plus(lines(1, 7, 0, 0, 100)).plus(lines(2, 7, 1, 0, 100));
    assertUpper(2 * MEAN_OF_ONE * UPPER, dose);
    assertEquals(2 * MEAN_OF_ONE, highest(dose, Worth.BEST).orElseThrow(), 1e-9 * MEAN_OF_ONE);
  }

  @Test
  void slicesOfOnePointAddTheirElectronsExactly() {
    Job job = Fixtures.count(Duration.ofSeconds(95), Fixtures.point(3, 4));
    List<Delivery> slices = planned(job, Fixtures.exact());
    assertEquals(4, slices.size());
    // physics #4.1/SiO2 quartz: 1.268 um by mean Z and A, times 0.9948.
    double sigma = 1.268e-6 * 0.9948 / 2.354820045;
    double expected = 1e-9 * 95 / 1.602176634e-19 / (2 * Math.PI * (sigma * sigma) * 1e18);
    double highest = highest(NOTHING.plus(slices), Worth.UPPER).orElseThrow();
    assertEquals(1, highest / expected, 0.001);
    SampleDose again = NOTHING.plus(slices).plus(moved(slices, 9));
    assertEquals(2 * highest, highest(again, Worth.UPPER).orElseThrow(), 1e-12 * highest);
  }

  @Nested
  class AGrant {
    @Test
    void isReplacedByWhatWasDelivered() {
      SampleDose open = NOTHING.plus(lines(1, 7, 0, 0, 100));
      SampleDose booked = open.replacing(1, touching(lines(1, 7, 0, 0, 100), 40));
      assertTrue(booked.holds(1));
      assertEquals(
          40 * 0.2e-6,
          height(
              booked
                  .passes()
                  .get(0)
                  .footprints(Worth.BEST, averages(), Fixtures.PLACED, Axes.SAMPLE)),
          1e-10);
    }

    @Test
    void thatIsVoidIsGone() {
      SampleDose dose = NOTHING.plus(lines(1, 7, 0, 0, 50)).plus(lines(2, 7, 0, 50, 50));
      assertEquals(NOTHING.upper(), dose.without(1).without(2).upper());
      assertTrue(dose.without(1).holds(2));
      assertTrue(dose.holds(1));
    }

    @Test
    void isCountedOnce() {
      SampleDose dose = NOTHING.plus(lines(1, 7, 0, 0, 50));
      assertEquals(
          "grant 1 is counted already",
          assertThrows(IllegalArgumentException.class, () -> dose.plus(lines(1, 7, 0, 50, 50)))
              .getMessage());
      assertEquals(
          "grant 2 is not counted",
          assertThrows(IllegalArgumentException.class, () -> dose.without(2)).getMessage());
    }
  }

  @Test
  void chargeIsCurrentTimesTime() {
    SampleDose dose = NOTHING.plus(lines(1, 7, 0, 0, 100));
    double best = 1e-9 * 40e-6 * 100 * 100;
    assertEquals(best, dose.best().coulombs(), 1e-12 * best);
    double upper = (1.0302e-9 * 1.1) * (40e-6 * 100 * 100);
    assertEquals(upper, dose.upper().coulombs(), 1e-12 * upper);
  }

  @Test
  void theTimeToBlankCountsAsChargeAndEvenlyInTheLines() {
    Abilities slower = Fixtures.instrument(0, 0, 0, Blanker.Kind.FAST, Duration.ofMillis(4));
    Exposure exposure = Fixtures.exposure(0, Fixtures.lines(FRAME, 100, 100, 0, 10));
    SampleDose dose =
        NOTHING.plus(Deliveries.planned(exposure, slower, Fixtures.ONE_NANOAMPERE, 1, 1));
    assertEquals(1e-9 * (10 * 4e-3 + 4e-3), dose.upper().coulombs(), 1e-24);
    assertUpper(1.1 * MEAN_OF_ONE, dose);
  }

  @Test
  void anotherPlacementWidensWhatWasMadeUnderTheFormerOne() {
    Placement before = new Placement(Fixtures.PLACED.origin(), 0, 3e-6);
    Placement now = new Placement(new Point(0, 0), 90, 4e-6);
    SampleDose dose = SampleDose.nothing(before).plus(placed(lines(1, 7, 0, 0, 100), before));
    double calibration = 0.02 * 10e-6;
    assertEquals(20e-6 + 2 * (calibration + 2e-6), upperHeight(dose, before), 1e-9);
    assertEquals(20e-6 + 2 * (calibration + 9e-6), upperHeight(dose.at(now), now), 1e-9);
  }

  /** Seeds are fixed: 300 mosaics without overlap at odd places, sizes and turns. */
  @Test
  void sharedEdgesOfTilesNeverAdd() {
    Random random = new Random(20310312);
    for (int round = 0; round < 300; round++) {
      double width = (1 + random.nextInt(3000)) * (random.nextBoolean() ? 1e-7 / 3 : 1e-8 / 7);
      Mosaic mosaic =
          new Mosaic(
              3,
              2,
              width,
              width * (0.3 + random.nextDouble()),
              0,
              new Point(random.nextDouble() * 1e-3, random.nextGaussian() * 1e-3),
              random.nextBoolean() ? 0 : random.nextDouble() * 360);
      Job job = Fixtures.map(mosaic, 7, 11, Duration.ofNanos(40_000), 1, "green");
      SampleDose dose = NOTHING.plus(planned(job, Fixtures.exact()));
      double one =
          highest(NOTHING.plus(planned(job, Fixtures.exact()).subList(0, 1)), Worth.UPPER)
              .orElseThrow();
      assertEquals(1, highest(dose, Worth.UPPER).orElseThrow() / one, 1e-9, "round " + round);
    }
  }

  @Test
  void sumsOfPassesThatAreAllTurnedAlikeAreExact() {
    Mosaic mosaic = new Mosaic(2, 2, 1e-4, 1e-4, 0.1, Fixtures.point(50, 20), 33);
    Job job = Fixtures.map(mosaic, 100, 100, Duration.ofNanos(40_000), 1, "green");
    SampleDose dose = NOTHING.plus(planned(job, Fixtures.exact()));
    double one = 1e-9 * 40e-6 / 1.602176634e-19 / (1000.0 * 1000.0);
    // Spots lie 1 um apart and are 0.54 um wide: the lattice counts too, alike in all tiles.
    double single =
        highest(NOTHING.plus(planned(job, Fixtures.exact()).subList(0, 1)), Worth.UPPER)
            .orElseThrow();
    assertTrue(single > one && single < 1.1 * one);
    assertEquals(4 * single, highest(dose, Worth.UPPER).orElseThrow(), 1e-9 * one);
  }

  /** Random parts of a pass, whatever their order: what is merged covers each of them. */
  @Test
  void mergingNeverLowers() {
    Random random = new Random(77);
    for (int round = 0; round < 200; round++) {
      SampleDose dose = NOTHING;
      int[] times = new int[100];
      for (int grant = 1; grant < 8; grant++) {
        int first = random.nextInt(100);
        int count = random.nextInt(1, 101 - first);
        dose = dose.plus(lines(grant, 7, 0, first, count));
        for (int line = first; line < first + count; line++) {
          times[line]++;
        }
      }
      List<Footprint> footprints =
          dose.passes().get(0).footprints(Worth.UPPER, averages(), Fixtures.PLACED, Axes.SAMPLE);
      for (int line = 0; line < 100; line++) {
        Box pixel =
            Box.around(Fixtures.lines(FRAME, 100, 100, line, 1).strip(line, 1), 0, 0, Axes.SAMPLE)
                .heart();
        double sum = Highest.sum(footprints, pixel);
        assertTrue(
            sum >= times[line] * MEAN_OF_ONE * UPPER * (1 - 1e-12),
            "round " + round + " line " + line);
      }
    }
  }

  private static void assertUpper(double expected, SampleDose dose) {
    assertEquals(expected, highest(dose, Worth.UPPER).orElseThrow(), 1e-4 * expected);
  }

  private static Optional<Double> highest(SampleDose dose, Worth worth) {
    View view = View.everywhere(new Averaging.OverGeneration(), Fixtures.quartz(), worth);
    return view.highest(dose.passes(), dose.passes()).map(View.Place::sum);
  }

  private static Averages averages() {
    return Averages.of(new Averaging.OverGeneration(), Fixtures.quartz().material());
  }

  private static double upperHeight(SampleDose dose, Placement present) {
    return height(dose.passes().get(0).footprints(Worth.UPPER, averages(), present, Axes.SAMPLE));
  }

  private static double height(List<Footprint> footprints) {
    Box box = footprints.get(0).box();
    return (box.top() - box.bottom()) * 1e-10;
  }

  private static List<Delivery> planned(Job job, Abilities abilities) {
    return Deliveries.whole(
        job, Fixtures.quartz(), abilities, Fixtures.ONE_NANOAMPERE, Done.NOTHING, Optional.empty());
  }

  private static Delivery lines(long grant, long stay, int pass, int first, int count) {
    Exposure exposure = Fixtures.exposure(pass, Fixtures.lines(FRAME, 100, 100, first, count));
    return Deliveries.planned(exposure, INSTRUMENT, Fixtures.ONE_NANOAMPERE, grant, stay);
  }

  private static Delivery touching(Delivery whole, long units) {
    return new Delivery(
        whole.grant(),
        whole.stay(),
        whole.exposure(),
        units,
        Duration.ZERO,
        Duration.ZERO,
        whole.bestCurrent(),
        whole.upperCurrent(),
        whole.tolerances());
  }

  private static Delivery atCurrent(Delivery delivery, Current read) {
    return Deliveries.planned(
        delivery.exposure(), INSTRUMENT, read, delivery.grant(), delivery.stay());
  }

  private static Delivery placed(Delivery delivery, Placement placement) {
    Exposure exposure = delivery.exposure();
    return Deliveries.planned(
        new Exposure(
            exposure.job(),
            exposure.pass(),
            exposure.sample(),
            placement,
            exposure.conditions(),
            exposure.scan()),
        INSTRUMENT,
        Fixtures.ONE_NANOAMPERE,
        delivery.grant(),
        delivery.stay());
  }

  private static List<Delivery> moved(List<Delivery> deliveries, long stay) {
    return deliveries.stream()
        .map(
            delivery ->
                Deliveries.planned(
                    delivery.exposure(),
                    Fixtures.exact(),
                    Fixtures.ONE_NANOAMPERE,
                    100 + delivery.grant(),
                    stay))
        .toList();
  }
}
