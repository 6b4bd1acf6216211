package beamwarden.simulated;

import beamwarden.beam.Point;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;

/**
 * What there is to see on a sample. All of it is invented and stands for no material: square grains
 * with bands of growth, a little different through each filter, and here and there a bright point.
 *
 * <p>Two instruments of one seed see the same. A yield is counts for each electron sent.
 */
final class Scene {
  private static final double GRAIN_METRES = 12e-6;
  private static final double BAND_METRES = 1.6e-6;
  private static final double EMITTER_CELL_METRES = 4e-6;
  private static final double EMITTER_SHARE = 0.3;
  private static final double EMITTER_SIGMA_METRES = 80e-9;
  private static final double EMITTER_REACH_SQUARE = Math.pow(4 * EMITTER_SIGMA_METRES, 2);
  private static final double LIGHT_YIELD = 2e-4;
  private static final double ELECTRON_YIELD = 0.05;
  private static final double EMITTER_YIELD = 8e-4;
  private static final int SAMPLED_LINES = 8;
  private static final int SAMPLED_PIXELS = 32;

  private final long seed;
  private final String channel;
  private final double base;

  /**
   * The scene of a sample through one channel.
   *
   * @param channel the filter's name, or {@code electron-image}
   * @param light whether the channel sees light
   */
  Scene(long seed, String sample, String channel, boolean light) {
    this.seed = Seeds.hash(seed, "scene", sample);
    this.channel = channel;
    this.base = light ? LIGHT_YIELD : ELECTRON_YIELD;
  }

  /** The yield at one place. */
  double at(Point place) {
    double[] one = new double[1];
    along(place.xMetres(), place.yMetres(), 0, 0, one);
    return one[0];
  }

  /** The yields of one line's pixels, counted from the frame's first line. */
  void line(RasterScan raster, int row, double[] yields) {
    Rectangle frame = raster.frame();
    double pitch = frame.widthMetres() / yields.length;
    double y = frame.heightMetres() / 2 - (row + 0.5) * raster.pitchYMetres();
    Point first = frame.at(-frame.widthMetres() / 2 + pitch / 2, y);
    Point step = new Point(pitch, 0).turned(frame.turnDegrees());
    along(first.xMetres(), first.yMetres(), step.xMetres(), step.yMetres(), yields);
  }

  /** The mean yield over some lines, from a few of their pixels. */
  double mean(RasterScan raster, long rows) {
    double[] yields = new double[Math.min(SAMPLED_PIXELS, raster.columns())];
    int lines = (int) Math.min(SAMPLED_LINES, rows);
    double sum = 0;
    for (int sampled = 0; sampled < lines; sampled++) {
      line(raster, raster.firstRow() + (int) (sampled * rows / lines), yields);
      for (double one : yields) {
        sum += one;
      }
    }
    return lines == 0 ? 0 : sum / ((double) lines * yields.length);
  }

  /** Grains and emitters are looked up again only when a pixel lies in another one. */
  private void along(double x0, double y0, double dx, double dy, double[] yields) {
    Grain grain = new Grain();
    Emitter emitter = new Emitter();
    for (int pixel = 0; pixel < yields.length; pixel++) {
      double x = x0 + pixel * dx;
      double y = y0 + pixel * dy;
      yields[pixel] = base * grain.shade(x, y) + emitter.light(x, y);
    }
  }

  /** The whole number at or below. */
  private static long below(double number) {
    long towardsZero = (long) number;
    return number < towardsZero ? towardsZero - 1 : towardsZero;
  }

  /** One grain: its brightness and the phase of its growth bands. */
  private final class Grain {
    private long column = Long.MIN_VALUE;
    private long row;
    private double brightness;
    private double phase;

    double shade(double x, double y) {
      long atColumn = below(x / GRAIN_METRES);
      long atRow = below(y / GRAIN_METRES);
      if (atColumn != column || atRow != row) {
        column = atColumn;
        row = atRow;
        brightness = 0.3 + 1.2 * Seeds.share(Seeds.hash(seed, "grain", column, row, channel));
        phase = Seeds.share(Seeds.hash(seed, "bands", column, row));
      }
      double turns = (x + 0.4 * y) / BAND_METRES + phase;
      double saw = turns - below(turns);
      return brightness * (0.7 + 0.6 * Math.abs(2 * saw - 1));
    }
  }

  /** The bright point of one cell, if it has one; the electron detector sees none. */
  private final class Emitter {
    private long column = Long.MIN_VALUE;
    private long row;
    private boolean shines;
    private double x;
    private double y;

    double light(double atX, double atY) {
      long atColumn = below(atX / EMITTER_CELL_METRES);
      long atRow = below(atY / EMITTER_CELL_METRES);
      if (atColumn != column || atRow != row) {
        column = atColumn;
        row = atRow;
        place();
      }
      if (!shines) {
        return 0;
      }
      double square = (atX - x) * (atX - x) + (atY - y) * (atY - y);
      return square > EMITTER_REACH_SQUARE
          ? 0
          : EMITTER_YIELD * Math.exp(-square / (2 * EMITTER_SIGMA_METRES * EMITTER_SIGMA_METRES));
    }

    private void place() {
      long hash = Seeds.hash(seed, "emitter", column, row);
      shines = base == LIGHT_YIELD && Seeds.share(hash) < EMITTER_SHARE;
      x = (column + 0.2 + 0.6 * Seeds.share(Seeds.mixed(hash))) * EMITTER_CELL_METRES;
      y = (row + 0.2 + 0.6 * Seeds.share(Seeds.mixed(hash + 1))) * EMITTER_CELL_METRES;
    }
  }
}
