package beamwarden.dose;

import static org.junit.jupiter.api.Assertions.assertEquals;

import beamwarden.beam.Mode;
import beamwarden.beam.Mosaic;
import beamwarden.beam.Point;
import beamwarden.beam.Points;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.beam.Region;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import beamwarden.queue.Acquisition;
import beamwarden.queue.Averaging;
import beamwarden.queue.Job;
import beamwarden.queue.Sample;
import java.time.Duration;
import java.util.Arrays;
import java.util.Collections;
import java.util.List;
import java.util.Optional;
import java.util.OptionalLong;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvFileSource;

/** Values computed elsewhere, each with its source, in the tables beside this test. */
class CheckValuesTest {
  private static final int SIDE = 64;
  private static final Sample OVER_PROBE =
      Fixtures.quartz(Fixtures.fluence(1, new Averaging.OverProbe()));

  @ParameterizedTest(name = "{4}: {0}, {1}")
  @CsvFileSource(resources = "check-values.tsv", delimiter = '\t', numLinesToSkip = 2)
  void dosesAreRight(
      String what, String inputs, double expected, double tolerance, String id, String source) {
    double[] in = Arrays.stream(inputs.split(" ")).mapToDouble(Double::parseDouble).toArray();
    assertEquals(expected, value(what, in), tolerance, source);
  }

  private static double value(String what, double[] in) {
    return switch (what) {
      case "mean in e/nm2 of A, us, nm, frames, filters" ->
          dose(map(in, (int) in[3], (int) in[4]), 10).mean().electronsPerSquareNanometre();
      case "mean in C/m2 of A, us, nm, frames, filters" ->
          dose(map(in, (int) in[3], (int) in[4]), 10).mean().coulombsPerSquareMetre();
      case "highest in e/nm2 of A, us, nm, probe width in nm" -> highest(map(in, 1, 1), in[3]);
      case "highest in e/nm2 of three filters in a mosaic" ->
          // Wide spots, so that the mean counts.
          highest(raster(in[0], in[1], mosaic(in[2]), 1, 3), 100);
      case "highest in e/nm2 of a rest of A, s, width in nm" -> highest(rest(in[0], in[1]), in[2]);
      case "mean in e/nm2 of a rest of A, s, width in nm" ->
          dose(rest(in[0], in[1]), in[2]).mean().electronsPerSquareNanometre();
      case "seconds of a rest to 1e4 e/nm2 of A, width in nm" ->
          1e4 / highest(rest(in[0], 1), in[1]);
      case "extra charge in percent of pixels, us, us of flyback" -> {
        double blanked = charge(in, Blanker.Kind.FAST);
        yield (charge(in, Blanker.Kind.SLOW) / blanked - 1) * 100;
      }
      case "first column over mean of us, us of rest" -> firstColumn(in[0], in[1]);
      default -> throw new IllegalArgumentException(what);
    };
  }

  private static double highest(Job job, double probeNanometres) {
    return dose(job, probeNanometres)
        .highestUpper()
        .orElseThrow()
        .fluence()
        .electronsPerSquareNanometre();
  }

  private static JobDose dose(Job job, double probeNanometres) {
    return JobDose.of(
        job,
        OVER_PROBE,
        Fixtures.withProbe(Fixtures.exact(), probeNanometres),
        SampleDose.nothing(Fixtures.PLACED),
        Done.NOTHING,
        Optional.empty());
  }

  private static Job map(double[] in, int frames, int filters) {
    double side = SIDE * in[2] * 1e-3;
    return raster(in[0], in[1], Fixtures.square(3, 4, side, side), frames, filters);
  }

  private static Mosaic mosaic(double pitchNanometres) {
    double side = SIDE * pitchNanometres * 1e-9;
    return new Mosaic(3, 3, side, side, 0.1, Fixtures.point(5, -2), 0);
  }

  private static Job raster(double amperes, double micros, Region region, int frames, int filters) {
    List<String> names = Collections.nCopies(filters, "green");
    return Fixtures.job(
        new Acquisition.Raster(Mode.INTENSITY_MAP, SIDE, SIDE, micros(micros), names, frames),
        region,
        amperes);
  }

  private static Job rest(double amperes, double seconds) {
    return Fixtures.job(
        new Acquisition.Spot(Mode.PHOTON_CORRELATION, micros(seconds * 1e6), OptionalLong.empty()),
        new Points(List.of(Fixtures.point(1, 1))),
        amperes);
  }

  private static double charge(double[] in, Blanker.Kind kind) {
    return line((int) in[0], in[1], in[2], kind).upper().coulombs();
  }

  private static double firstColumn(double dwell, double rest) {
    double blanked = mean(line(64, dwell, rest, Blanker.Kind.FAST));
    return mean(line(64, dwell, rest, Blanker.Kind.SLOW)) / blanked;
  }

  private static double mean(SampleDose dose) {
    View view = View.everywhere(new Averaging.OverGeneration(), OVER_PROBE, Worth.UPPER);
    return view.highest(dose.passes(), dose.passes()).orElseThrow().sum();
  }

  private static SampleDose line(int pixels, double dwell, double flyback, Blanker.Kind kind) {
    Abilities abilities = Fixtures.instrument(0, 0, 0, kind, Duration.ZERO);
    RasterScan scan =
        new RasterScan(
            Fixtures.square(0, 0, pixels * 0.01, 0.64),
            pixels,
            64,
            0,
            64,
            micros(dwell),
            micros(flyback));
    return SampleDose.nothing(Fixtures.PLACED)
        .plus(
            Deliveries.planned(
                Fixtures.exposure(0, scan), abilities, Fixtures.ONE_NANOAMPERE, 1, 1));
  }

  private static Duration micros(double micros) {
    return Duration.ofNanos(Math.round(micros * 1000));
  }

  @ParameterizedTest(name = "{5}")
  @CsvFileSource(resources = "mosaics.tsv", delimiter = '\t', numLinesToSkip = 2)
  void seamsAndCornersOfAMosaicHaveTheirShares(
      double overlap,
      String once,
      String twice,
      String fourfold,
      String mean,
      String id,
      String source) {
    int[] pixelsByTimes =
        rasterised(new Mosaic(3, 3, 1e-4, 1e-4, overlap, Fixtures.point(7, 9), 0));
    double all = Arrays.stream(pixelsByTimes).sum();
    assertShare(once, pixelsByTimes[1] / all, source);
    assertShare(twice, pixelsByTimes[2] / all, source);
    assertShare(fourfold, pixelsByTimes[4] / all, source);
    assertShare(
        mean, (pixelsByTimes[1] + 2.0 * pixelsByTimes[2] + 4.0 * pixelsByTimes[4]) / all, source);
  }

  /** How many of the pixels of one period around the middle are exposed how often. */
  private static int[] rasterised(Mosaic mosaic) {
    // Five pixels to half a seam, so that no pixel is cut.
    int pixels = (int) Math.round(10 * (1 - mosaic.overlap()) / mosaic.overlap());
    double period = mosaic.tileWidthMetres() * (1 - mosaic.overlap());
    List<Box> boxes =
        mosaic.tiles().stream().map(tile -> Box.around(tile, 0, 0, Axes.SAMPLE)).toList();
    int[] byTimes = new int[10];
    for (int column = 0; column < pixels; column++) {
      for (int row = 0; row < pixels; row++) {
        double x = mosaic.centre().xMetres() + ((column + 0.5) / pixels - 0.5) * period;
        double y = mosaic.centre().yMetres() + ((row + 0.5) / pixels - 0.5) * period;
        Box pixel = Box.around(Rectangle.of(new Point(x, y), 2e-10, 2e-10), 0, 0, Axes.SAMPLE);
        byTimes[(int) boxes.stream().filter(box -> box.contains(pixel)).count()]++;
      }
    }
    return byTimes;
  }

  private static void assertShare(String expected, double share, String source) {
    int digits = expected.length() - expected.indexOf('.') - 1;
    assertEquals(Double.parseDouble(expected), share, 0.5 * Math.pow(10, -digits), source);
  }
}
