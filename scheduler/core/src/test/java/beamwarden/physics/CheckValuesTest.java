package beamwarden.physics;

import static java.util.Map.entry;
import static org.junit.jupiter.api.Assertions.assertEquals;

import beamwarden.quantity.Current;
import beamwarden.quantity.Fluence;
import beamwarden.quantity.Voltage;
import java.time.Duration;
import java.util.Arrays;
import java.util.Map;
import java.util.function.ToDoubleFunction;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvFileSource;

/** Values computed elsewhere, each with its source, in the tables beside this test. */
class CheckValuesTest {
  private static final double E = Current.ELEMENTARY_CHARGE_COULOMBS;

  private static final Map<String, ToDoubleFunction<double[]>> UNITS =
      Map.ofEntries(
          entry("electrons per coulomb", in -> new Current(in[0]).electronsIn(seconds(1))),
          entry("electrons per second", in -> new Current(in[0]).electronsIn(seconds(1))),
          entry("C/m2", in -> new Fluence(in[0]).coulombsPerSquareMetre()),
          entry("e/nm2 of C/m2", in -> in[0] / new Fluence(1).coulombsPerSquareMetre()),
          entry("charge in uC", in -> new Current(in[0]).chargeIn(seconds(in[1])).coulombs() * 1e6),
          entry("electrons", in -> new Current(in[0]).electronsIn(seconds(in[1]))),
          entry("rest energy in keV", in -> Electrons.restEnergyElectronvolts() / 1000),
          entry("wavelength in pm", in -> Electrons.wavelength(new Voltage(in[0])).metres() * 1e12),
          entry("speed over c", in -> Electrons.speed(new Voltage(in[0]))),
          entry("excess of a rounded charge in percent", in -> (E / in[0] - 1) * 100));

  private static final Map<String, ToDoubleFunction<double[]>> RASTER =
      Map.ofEntries(
          entry("width over pitch", in -> in[0] * GaussianSpot.WIDTH_OVER_SIGMA),
          entry("highest over mean", in -> Math.pow(Lattice.highest(in[0]), 2)),
          entry("lowest over mean", in -> Math.pow(Lattice.lowest(in[0]), 2)),
          entry("deviation over mean", in -> Lattice.deviation(in[0])),
          entry(
              "highest over mean of a rectangle",
              in -> Lattice.highest(in[0] / in[1]) * Lattice.highest(in[0] / in[2])),
          entry(
              "lowest over mean of a rectangle",
              in -> Lattice.lowest(in[0] / in[1]) * Lattice.lowest(in[0] / in[2])),
          entry(
              "isolated spot over highest",
              in -> 1 / (2 * Math.PI * in[0] * in[0]) / Math.pow(Lattice.highest(in[0]), 2)),
          entry("electrons on a pixel", in -> new Current(in[0]).electronsIn(seconds(in[1]))),
          entry("sigma in nm of a width in nm", in -> GaussianSpot.sigma(in[0])),
          entry("electrons per nm of a line", in -> in[0] * in[1] / E / in[2]),
          entry(
              "highest of a line in e/nm2",
              in -> spot(in[3]).highestOfLine(in[0] * in[1] / E / (in[2] * 1e-9))),
          entry("highest of a spot in e/nm2", in -> spot(in[2]).highest(in[0] * in[1] / E)),
          entry(
              "mean in the circle of half maximum in e/nm2",
              in -> spot(in[2]).highest(in[0] * in[1] / E) * GaussianSpot.MEAN_OVER_HIGHEST),
          entry("mean in the circle over highest", in -> GaussianSpot.MEAN_OVER_HIGHEST),
          entry("edge", in -> new GaussianSpot(1).edge(in[0])),
          entry("corner", in -> Math.pow(new GaussianSpot(1).edge(in[0]), 2)),
          entry(
              "excess of a width of N-1 pitches in percent",
              in -> (Math.pow(in[0] / (in[0] - 1), 2) - 1) * 100),
          entry("erfc", in -> GaussianSpot.erfc(in[0])));

  @ParameterizedTest(name = "{4}: {0} of {1}")
  @CsvFileSource(resources = "units.tsv", delimiter = '\t', numLinesToSkip = 2)
  void unitsAreRight(
      String what, String inputs, double expected, double tolerance, String id, String source) {
    assertEquals(expected, UNITS.get(what).applyAsDouble(numbers(inputs)), tolerance, source);
  }

  @ParameterizedTest(name = "{4}: {0} of {1}")
  @CsvFileSource(resources = "raster.tsv", delimiter = '\t', numLinesToSkip = 2)
  void rastersAndSpotsAreRight(
      String what, String inputs, double expected, double tolerance, String id, String source) {
    assertEquals(expected, RASTER.get(what).applyAsDouble(numbers(inputs)), tolerance, source);
  }

  @ParameterizedTest(name = "{4}: {0} of {1}")
  @CsvFileSource(resources = "range.tsv", delimiter = '\t', numLinesToSkip = 2)
  void rangesAreRight(
      String what, String inputs, double expected, double tolerance, String id, String source) {
    assertEquals(expected, range(what, inputs.split(" ")), tolerance, source);
  }

  private static double range(String what, String[] in) {
    Formula formula = Formula.parse(in[0]);
    double density = Double.parseDouble(in[1]);
    return switch (what) {
      case "mean Z" -> meanNumber(formula);
      case "mean A" -> meanWeight(formula);
      case "range in um" -> rangeMicrometres(formula, density, in[2]);
      case "range of mean Z and A in um" -> ofMeans(formula, density, in[2]);
      case "range over range of mean Z and A" ->
          rangeMicrometres(formula, density, in[2]) / ofMeans(formula, density, in[2]);
      case "range over path length" ->
          rangeMicrometres(formula, density, in[2]) * 1e-4 * density / Double.parseDouble(in[3]);
      default -> throw new IllegalArgumentException(what);
    };
  }

  private static double rangeMicrometres(Formula formula, double density, String kilovolts) {
    Voltage voltage = new Voltage(Double.parseDouble(kilovolts) * 1000);
    return new GenerationRange(formula, density).at(voltage).metres() * 1e6;
  }

  /** The other rule for compounds, which the program does not use. */
  private static double ofMeans(Formula formula, double density, String kilovolts) {
    return 0.0276
        * meanWeight(formula)
        * Math.pow(Double.parseDouble(kilovolts), 1.67)
        / (Math.pow(meanNumber(formula), 0.89) * density);
  }

  private static double meanNumber(Formula formula) {
    return formula.massParts().entrySet().stream()
        .mapToDouble(part -> part.getValue() * part.getKey().number())
        .sum();
  }

  private static double meanWeight(Formula formula) {
    return formula.massParts().entrySet().stream()
        .mapToDouble(part -> part.getValue() * part.getKey().weight())
        .sum();
  }

  private static GaussianSpot spot(double widthNanometres) {
    return new GaussianSpot(GaussianSpot.sigma(widthNanometres * 1e-9));
  }

  private static Duration seconds(double seconds) {
    return Duration.ofNanos(Math.round(seconds * 1e9));
  }

  private static double[] numbers(String text) {
    return text == null
        ? new double[0]
        : Arrays.stream(text.split(" ")).mapToDouble(Double::parseDouble).toArray();
  }
}
