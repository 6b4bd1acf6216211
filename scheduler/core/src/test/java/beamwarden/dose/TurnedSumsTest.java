package beamwarden.dose;

import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.beam.SpotScan;
import beamwarden.instrument.Abilities;
import beamwarden.physics.GaussianSpot;
import beamwarden.queue.Area;
import beamwarden.queue.Sample;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import java.util.function.ToDoubleFunction;
import org.junit.jupiter.api.Test;

/** Rectangles of any turn, and points among them, held against sums at many places. Seeded. */
class TurnedSumsTest {
  private static final Abilities EXACT = Fixtures.exact();
  private static final double LIMIT = 25;

  /** N = I·t/e over 200 nm by 200 nm, spots so wide that the lattice is even. */
  private static final double ONE_PASS = 1e-9 * 40e-6 / 1.602176634e-19 / (200.0 * 200.0);

  private static final double SIGMA = GaussianSpot.sigma(Math.hypot(10e-9, 1.268e-6 * 0.9948));

  @Test
  void theHighestIsNowhereBelowTheSumAtAPlace() {
    for (long seed = 1; seed <= 100; seed++) {
      Random random = new Random(seed);
      SampleDose dose = SampleDose.nothing(Fixtures.PLACED);
      List<ToDoubleFunction<Point>> truth = new ArrayList<>();
      for (int grant = 1; grant <= 8; grant++) {
        Delivery delivery = random.nextInt(4) == 0 ? rest(random, grant) : map(random, grant);
        dose = dose.plus(delivery);
        truth.add(truth(delivery));
      }
      double upper =
          Caps.standing(Fixtures.quartz(Fixtures.overGeneration(1e9)), dose).get(0).upper();
      for (int i = 0; i < 500; i++) {
        Point place = Fixtures.point(random.nextGaussian() * 12, random.nextGaussian() * 12);
        double sum = truth.stream().mapToDouble(one -> one.applyAsDouble(place)).sum();
        assertTrue(upper >= sum * (1 - 1e-4), "seed " + seed + ": " + upper + " below " + sum);
      }
    }
  }

  @Test
  void whatIsAdmittedNeverStandsAboveTheCap() {
    int admitted = 0;
    int refused = 0;
    for (long seed = 1; seed <= 100; seed++) {
      Random random = new Random(seed);
      Placement placement = new Placement(new Point(0, 0), 0, 1e-6);
      Area spent =
          new Area(
              "spent",
              new Rectangle(Fixtures.point(0, 200), 30e-6, 30e-6, random.nextInt(3) * 20),
              Area.Use.SACRIFICIAL);
      Sample sample = Fixtures.quartz(placement, List.of(spent), Fixtures.overGeneration(LIMIT));
      SampleDose dose = SampleDose.nothing(placement);
      for (int grant = 1; grant <= 12; grant++) {
        Delivery asked = random.nextInt(5) == 0 ? rest(random, grant) : map(random, grant);
        if (Caps.admit(sample, dose, asked) instanceof CapVerdict.Admitted) {
          dose = dose.plus(asked);
          admitted++;
        } else {
          refused++;
        }
        double upper = Caps.standing(sample, dose).get(0).upper();
        assertTrue(upper <= LIMIT, "seed " + seed + ": stands at " + upper);
      }
    }
    assertTrue(admitted > 100 && refused > 100, admitted + " admitted, " + refused + " refused");
  }

  private static Delivery map(Random random, long grant) {
    Rectangle frame =
        new Rectangle(
            Fixtures.point(random.nextInt(30) - 15, random.nextInt(30) - 15),
            20e-6,
            (5 + random.nextInt(20)) * 1e-6,
            random.nextBoolean() ? random.nextInt(4) * 30 : random.nextDouble() * 180);
    int rows = (int) Math.round(frame.heightMetres() / 200e-9);
    return Deliveries.planned(
        Fixtures.exposure((int) grant, Fixtures.lines(frame, 100, rows, 0, rows)),
        EXACT,
        Fixtures.ONE_NANOAMPERE,
        grant,
        grant);
  }

  /** A rest that gives about one pass of a map in its middle. */
  private static Delivery rest(Random random, long grant) {
    Point at = Fixtures.point(random.nextInt(30) - 15, random.nextInt(30) - 15);
    return Deliveries.planned(
        Fixtures.exposure((int) grant, new SpotScan(at, Duration.ofMillis(2))),
        EXACT,
        Fixtures.ONE_NANOAMPERE,
        grant,
        grant);
  }

  private static ToDoubleFunction<Point> truth(Delivery delivery) {
    if (delivery.exposure().scan() instanceof SpotScan spot) {
      double electrons = Fixtures.ONE_NANOAMPERE.electronsIn(spot.time());
      GaussianSpot gaussian = new GaussianSpot(SIGMA);
      return place ->
          gaussian.highest(electrons) * gaussian.falloff(place.distanceMetres(spot.at()));
    }
    Rectangle frame = ((RasterScan) delivery.exposure().scan()).frame();
    return place -> {
      Point own =
          place
              .plus(-frame.centre().xMetres(), -frame.centre().yMetres())
              .turned(-frame.turnDegrees());
      boolean inside =
          Math.abs(own.xMetres()) < frame.widthMetres() / 2
              && Math.abs(own.yMetres()) < frame.heightMetres() / 2;
      return inside ? ONE_PASS : 0;
    };
  }
}
