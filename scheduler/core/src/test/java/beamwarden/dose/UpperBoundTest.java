package beamwarden.dose;

import static org.junit.jupiter.api.Assertions.assertInstanceOf;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Conditions;
import beamwarden.beam.Exposure;
import beamwarden.beam.Mode;
import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.beam.Scan;
import beamwarden.beam.SpotScan;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.Receipt;
import beamwarden.physics.GaussianSpot;
import beamwarden.physics.Lattice;
import beamwarden.quantity.Current;
import beamwarden.quantity.Voltage;
import beamwarden.queue.Area;
import beamwarden.queue.Averaging;
import beamwarden.queue.Sample;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Random;
import java.util.function.ToDoubleFunction;
import org.junit.jupiter.api.Test;

/**
 * Upper booked is never below delivered, anywhere, while reality keeps the guarantees: 300 seeded
 * histories with errors of placement, stage, scan gain, current and time to blank.
 */
class UpperBoundTest {
  private static final double CALIBRATION = 0.03;
  private static final double REPEATABILITY = 1.5e-6;
  private static final double UNCERTAINTY = 2e-6;
  private static final double TOLERANCE = 0.03;
  private static final double FLOOR = 2e-13;
  private static final double DRIFT = 0.1;
  private static final Duration BLANKING = Duration.ofNanos(100_000);
  private static final double WISHED = 1e-9;

  @Test
  void upperIsNowhereBelowWhatWasDelivered() {
    for (long seed = 1; seed <= 300; seed++) {
      new Night(seed).check();
    }
  }

  /** One history of a sample, as booked and as it truly was. */
  private static final class Night {
    private final Random random;
    private final String name;
    private final Abilities abilities;
    private final Placement before;
    private final Placement now;
    private final Map<Placement, Point> placementErrors;
    private final Sample sample;
    private final List<ToDoubleFunction<Point>> delivered = new ArrayList<>();
    private final List<Point> places = new ArrayList<>();
    private SampleDose dose;
    private double deliveredCoulombs;
    private long grants;

    Night(long seed) {
      random = new Random(seed);
      name = "seed " + seed;
      Blanker.Kind blanker = seed % 4 == 0 ? Blanker.Kind.SLOW : Blanker.Kind.FAST;
      abilities = Fixtures.instrument(CALIBRATION, REPEATABILITY, DRIFT, blanker, BLANKING);
      before = new Placement(Fixtures.point(0, 0), 0, UNCERTAINTY);
      now = new Placement(Fixtures.point(70, 10), 3, UNCERTAINTY);
      placementErrors = Map.of(before, within(UNCERTAINTY), now, within(UNCERTAINTY));
      Rectangle outline = new Rectangle(somewhere(30), 20e-6, 15e-6, random.nextBoolean() ? 0 : 25);
      sample =
          Fixtures.quartz(
              now,
              List.of(new Area("grain", outline, Area.Use.CAPPED)),
              Fixtures.overGeneration(1e9),
              Fixtures.fluenceIn("grain", 1e9));
      dose = SampleDose.nothing(now);
    }

    void check() {
      int stays = 3 + random.nextInt(4);
      for (int stay = 1; stay <= stays; stay++) {
        Placement placement = stay <= 2 ? before : now;
        if (random.nextInt(4) == 0) {
          rests(stay, placement);
        } else {
          rasters(stay, placement);
        }
      }
      assertCovered();
    }

    private void assertCovered() {
      List<Standing> standing = Caps.standing(sample, dose);
      Averages averages = Averages.of(new Averaging.OverGeneration(), sample.material());
      List<Footprint> footprints =
          dose.passes().stream()
              .flatMap(pass -> pass.footprints(Worth.UPPER, averages, now, Axes.SAMPLE).stream())
              .toList();
      Box grain = Ground.box(sample.areas().get(0), new Axes(turnOfGrain()));
      for (Point place : places) {
        Point truly =
            place.plus(placementErrors.get(now).xMetres(), placementErrors.get(now).yMetres());
        double given = delivered.stream().mapToDouble(one -> one.applyAsDouble(truly)).sum();
        double booked = Highest.sum(footprints, Box.square(place, 0, Axes.SAMPLE));
        assertTrue(booked >= given * (1 - 1e-9), name + ": " + booked + " booked, " + given);
        assertTrue(standing.get(0).upper() >= given * (1 - 1e-9), name + ": highest");
        if (grain.contains(Box.square(truly, 0, new Axes(turnOfGrain())))) {
          assertTrue(standing.get(1).upper() >= given * (1 - 1e-9), name + ": in the area");
        }
      }
      assertTrue(dose.upper().coulombs() >= deliveredCoulombs, name + ": charge");
      assertTrue(dose.best().coulombs() <= dose.upper().coulombs(), name + ": best");
    }

    private double turnOfGrain() {
      return sample.areas().get(0).outline().turnDegrees();
    }

    /** One or two passes of one frame, each in slices, some aborted and taken up again. */
    private void rasters(int stay, Placement placement) {
      double turn = random.nextInt(3) == 0 ? random.nextDouble() * 90 : 0;
      Rectangle frame =
          new Rectangle(
              somewhere(25),
              (5 + random.nextInt(30)) * 1e-6,
              (5 + random.nextInt(30)) * 1e-6,
              turn);
      int rows = 20 + random.nextInt(60);
      int columns = 10 + random.nextInt(90);
      Truth truth =
          new Truth(placement, error(CALIBRATION), error(CALIBRATION), within(REPEATABILITY));
      for (int pass = 0; pass < 1 + random.nextInt(2); pass++) {
        int line = 0;
        while (line < rows && random.nextInt(10) > 0) {
          int count = Math.min(rows - line, 1 + random.nextInt(rows));
          RasterScan scan =
              new RasterScan(
                  frame,
                  columns,
                  rows,
                  line,
                  count,
                  Duration.ofNanos(40_000),
                  Duration.ofNanos(200_000));
          line += expose(stay, pass, placement, scan, truth);
        }
      }
    }

    private void rests(int stay, Placement placement) {
      Point at = somewhere(25);
      Truth truth = new Truth(placement, 0, 0, within(REPEATABILITY));
      for (int slice = 0; slice < 1 + random.nextInt(3); slice++) {
        expose(stay, 0, placement, new SpotScan(at, Duration.ofMillis(200)), truth);
      }
    }

    /** Exposes as an honest instrument would, books the receipt; returns whole units done. */
    private int expose(int stay, int pass, Placement placement, Scan scan, Truth truth) {
      double atReading = WISHED * (1 + 0.5 * error(DRIFT));
      double read = atReading * (1 + 0.9 * error(TOLERANCE)) + 0.9 * error(FLOOR);
      double flowed = atReading * (1 + error(DRIFT));
      Exposure exposure =
          new Exposure(
              "job",
              pass,
              "sst-07",
              placement,
              new Conditions(
                  new BeamSettings(new Voltage(10_000), new Current(WISHED)),
                  scan instanceof SpotScan ? Mode.PHOTON_CORRELATION : Mode.INTENSITY_MAP,
                  "green"),
              scan);
      Delivery inFull = Deliveries.planned(exposure, abilities, new Current(read), ++grants, stay);
      dose = dose.plus(inFull);
      boolean aborted = random.nextInt(3) == 0;
      long done = aborted ? random.nextLong(scan.units()) : scan.units();
      boolean begun = aborted && random.nextBoolean();
      long touched = begun ? done + 1 : done;
      Duration beamOn = beamOn(scan, done, begun);
      Receipt receipt =
          new Receipt(
              grants,
              1,
              done,
              touched,
              beamOn,
              Optional.empty(),
              Optional.empty(),
              Map.of(),
              List.of(),
              Optional.empty());
      Receiving.Believed believed =
          assertInstanceOf(
              Receiving.Believed.class,
              Deliveries.received(inFull, receipt, abilities.meter()),
              name);
      dose = dose.replacing(grants, believed.delivered());
      deliveredCoulombs += new Current(flowed).chargeIn(beamOn).coulombs();
      if (touched > 0) {
        delivered.add(truth.of(scan, touched, new Current(flowed), beamOn));
        lookAt(scan, touched);
      }
      return Math.toIntExact(Math.min(done, 1000));
    }

    private Duration beamOn(Scan scan, long done, boolean begun) {
      if (done == 0 && !begun) {
        return Duration.ZERO;
      }
      if (scan instanceof SpotScan) {
        return Duration.ofNanos(done + (begun ? 1 : 0)).plus(blankingTime());
      }
      RasterScan raster = (RasterScan) scan;
      boolean blanked = abilities.blanker().kind() == Blanker.Kind.FAST;
      Duration line = blanked ? raster.lineBeamOn() : raster.lineBeamOn().plus(raster.flyback());
      Duration part = begun ? Duration.ofNanos(random.nextLong(line.toNanos())) : Duration.ZERO;
      Duration all = line.multipliedBy(done).plus(part);
      return done == raster.units() ? all.plus(blankingTime()) : all;
    }

    private Duration blankingTime() {
      return Duration.ofNanos(random.nextLong(BLANKING.toNanos() + 1));
    }

    private void lookAt(Scan scan, long touched) {
      for (int i = 0; i < 12; i++) {
        if (scan instanceof RasterScan raster) {
          Rectangle strip = raster.strip(raster.firstRow(), Math.toIntExact(touched));
          double reach = i % 3 == 0 ? 0.5 : 0.55;
          places.add(
              strip.at(
                  (2 * random.nextDouble() - 1) * reach * strip.widthMetres(),
                  (i % 2 == 0 ? 1 : 2 * random.nextDouble() - 1) * reach * strip.heightMetres()));
        } else {
          places.add(
              ((SpotScan) scan)
                  .at()
                  .plus(random.nextGaussian() * 1e-6, random.nextGaussian() * 1e-6));
        }
      }
    }

    private Point somewhere(int micrometres) {
      return Fixtures.point(
          random.nextInt(2 * micrometres + 1) - micrometres,
          random.nextInt(2 * micrometres + 1) - micrometres);
    }

    private Point within(double radius) {
      return new Point(radius * Math.sqrt(random.nextDouble()), 0)
          .turned(random.nextDouble() * 360);
    }

    /** Up to the limit either way; quite at it half of the time. */
    private double error(double limit) {
      double sign = random.nextBoolean() ? 1 : -1;
      return sign * limit * (random.nextBoolean() ? 1 : random.nextDouble());
    }

    /** Where and how the passes of one stay truly fell. */
    private final class Truth {
      private final Point shift;
      private final double gainX;
      private final double gainY;

      Truth(Placement placement, double gainX, double gainY, Point offset) {
        Point error = placementErrors.get(placement);
        this.shift = offset.plus(error.xMetres(), error.yMetres());
        this.gainX = 1 + gainX;
        this.gainY = 1 + gainY;
      }

      ToDoubleFunction<Point> of(Scan scan, long touched, Current flowed, Duration beamOn) {
        double sigma = GaussianSpot.sigma(Math.hypot(10e-9, 1.268e-6 * 0.9947));
        return scan instanceof RasterScan raster
            ? place -> onRaster(raster, touched, flowed, place, sigma)
            : place -> onSpot((SpotScan) scan, flowed.electronsIn(beamOn), place, sigma);
      }

      /** What lies beyond 8 sigma is left out of the books, and they say so. */
      private double onSpot(SpotScan scan, double electrons, Point place, double sigma) {
        double distance = place.distanceMetres(scan.at().plus(shift.xMetres(), shift.yMetres()));
        GaussianSpot spot = new GaussianSpot(sigma);
        return distance > 8 * sigma ? 0 : spot.highest(electrons) * spot.falloff(distance);
      }

      private double onRaster(
          RasterScan raster, long touched, Current flowed, Point place, double sigma) {
        Rectangle frame = raster.frame();
        Point centre = frame.centre().plus(shift.xMetres(), shift.yMetres());
        Point own = place.plus(-centre.xMetres(), -centre.yMetres()).turned(-frame.turnDegrees());
        double x = own.xMetres() / gainX;
        double line = (frame.heightMetres() / 2 - own.yMetres() / gainY) / raster.pitchYMetres();
        boolean inside =
            Math.abs(x) <= frame.widthMetres() / 2
                && line >= raster.firstRow()
                && line <= raster.firstRow() + touched;
        if (!inside) {
          return 0;
        }
        double pitchX = raster.pitchXMetres() * gainX;
        double pitchY = raster.pitchYMetres() * gainY;
        // At a slow blanker the beam rests at one end of the line for the whole flyback.
        boolean firstColumn = x < -frame.widthMetres() / 2 + raster.pitchXMetres();
        boolean rested = firstColumn && abilities.blanker().kind() == Blanker.Kind.SLOW;
        Duration onPixel = rested ? raster.dwell().plus(raster.flyback()) : raster.dwell();
        return flowed.electronsIn(onPixel)
            / (pitchX * pitchY * 1e18)
            * Lattice.highest(sigma / pitchX)
            * Lattice.highest(sigma / pitchY);
      }
    }
  }
}
