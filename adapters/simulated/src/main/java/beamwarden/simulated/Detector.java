package beamwarden.simulated;

import beamwarden.beam.Exposure;
import beamwarden.beam.Mode;
import beamwarden.beam.RasterScan;
import beamwarden.beam.SpotScan;
import beamwarden.instrument.DataFile;
import beamwarden.instrument.Grant;
import beamwarden.quantity.Current;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.SplittableRandom;

/** Counts what the scene gives for the electrons it got, and writes the data. */
final class Detector {
  private static final int BRIGHTEST = 65_535;
  private static final double NANOS = 1e9;

  private final Simulation simulation;
  private final Optional<DataFolder> folder;

  /**
   * A detector.
   *
   * @param folder where data files go; empty when none are written
   */
  Detector(Simulation simulation, Optional<DataFolder> folder) {
    this.simulation = simulation;
    this.folder = folder;
  }

  /**
   * What was counted and written.
   *
   * @param counts counts by channel
   * @param files data files, forced to disk
   */
  record Counted(Map<String, Long> counts, List<DataFile> files) {
    /** Nothing. */
    static final Counted NOTHING = new Counted(Map.of(), List.of());
  }

  /** Counts the whole units of an exposure. */
  Counted count(Grant grant, long unitsDone, Current current) {
    if (unitsDone == 0) {
      return Counted.NOTHING;
    }
    SplittableRandom random =
        Seeds.random(simulation.seed(), "counts", grant.number(), grant.fence());
    return grant.exposure().scan() instanceof RasterScan raster
        ? raster(grant, raster, (int) unitsDone, current, random)
        : spot(grant, (SpotScan) grant.exposure().scan(), unitsDone, current, random);
  }

  private Counted raster(
      Grant grant, RasterScan raster, int lines, Current current, SplittableRandom random) {
    Scene scene = scene(grant.exposure());
    double electrons = current.electronsIn(raster.dwell());
    String channel = channel(grant.exposure());
    if (folder.isEmpty() || !simulation.writesData()) {
      double expected = scene.mean(raster, lines) * electrons * raster.columns() * (double) lines;
      return new Counted(Map.of(channel, drawn(expected, random)), List.of());
    }
    byte[] pixels = new byte[2 * raster.columns() * lines];
    long sum = pixels(scene, raster, lines, electrons, random, pixels);
    return new Counted(
        Map.of(channel, sum), folder.get().image(grant, raster.columns(), lines, pixels));
  }

  /** 16 bits a pixel, the higher byte first, saturated as a real counter would be. */
  private static long pixels(
      Scene scene,
      RasterScan raster,
      int lines,
      double electrons,
      SplittableRandom random,
      byte[] pixels) {
    double[] yields = new double[raster.columns()];
    long sum = 0;
    int at = 0;
    for (int line = 0; line < lines; line++) {
      scene.line(raster, raster.firstRow() + line, yields);
      for (double each : yields) {
        int count = (int) Math.min(BRIGHTEST, Counting.poisson(each * electrons, random));
        sum += count;
        pixels[at++] = (byte) (count >> 8);
        pixels[at++] = (byte) count;
      }
    }
    return sum;
  }

  private Counted spot(
      Grant grant, SpotScan spot, long nanos, Current current, SplittableRandom random) {
    double perSecond =
        scene(grant.exposure()).at(spot.at()) * current.electronsIn(Duration.ofSeconds(1));
    double seconds = nanos / NANOS;
    if (grant.exposure().conditions().mode() != Mode.PHOTON_CORRELATION) {
      long counted = drawn(perSecond * seconds, random);
      return new Counted(Map.of(channel(grant.exposure()), counted), List.of());
    }
    PhotonPairs pairs = new PhotonPairs(perSecond, current.amperes(), seconds);
    List<Long> eachSecond = eachSecond(perSecond, seconds, random);
    Map<String, Long> counts =
        Map.of(
            "photons",
            eachSecond.stream().mapToLong(Long::longValue).sum(),
            "coincidences",
            drawn(pairs.atLongDelay(), random),
            "coincidences-at-zero-delay",
            drawn(pairs.atZeroDelay(), random));
    boolean written = folder.isPresent() && simulation.writesData();
    return new Counted(counts, written ? folder.get().table(grant, eachSecond, counts) : List.of());
  }

  private List<Long> eachSecond(double perSecond, double seconds, SplittableRandom random) {
    if (!simulation.writesData()) {
      return List.of(drawn(perSecond * seconds, random));
    }
    List<Long> counts = new ArrayList<>();
    for (double left = seconds; left > 0; left--) {
      counts.add(drawn(perSecond * Math.min(1, left), random));
    }
    return counts;
  }

  private long drawn(double expected, SplittableRandom random) {
    return simulation.noise() ? Counting.poisson(expected, random) : Math.round(expected);
  }

  private Scene scene(Exposure exposure) {
    boolean light = exposure.conditions().mode() != Mode.ELECTRON_IMAGE;
    return new Scene(simulation.seed(), exposure.sample(), channel(exposure), light);
  }

  private static String channel(Exposure exposure) {
    Mode mode = exposure.conditions().mode();
    return mode == Mode.ELECTRON_IMAGE ? mode.text() : exposure.conditions().filter();
  }
}
