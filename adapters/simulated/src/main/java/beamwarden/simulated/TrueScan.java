package beamwarden.simulated;

import beamwarden.beam.Point;
import beamwarden.beam.RasterScan;
import beamwarden.beam.Rectangle;
import beamwarden.beam.SpotScan;
import beamwarden.quantity.Current;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.OptionalLong;

/**
 * Where a run's electrons truly land: the scan stretched by its calibration error about its middle,
 * and moved by the stage's placement error.
 */
final class TrueScan {
  private final Run run;
  private final BeamPath path;
  private final Point shift;
  private final double gainX;
  private final double gainY;
  private final double probeMetres;

  /**
   * The true scan.
   *
   * @param stageError how far the stage stands from where it was sent, in stage coordinates
   * @param gainX by how much too long a scanned width is, 1 when it is right
   * @param gainY the same of a height
   * @param probeMetres the probe's diameter
   */
  TrueScan(
      Run run, BeamPath path, Point stageError, double gainX, double gainY, double probeMetres) {
    this.run = run;
    this.path = path;
    this.shift = stageError.turned(-run.placement().turnDegrees());
    this.gainX = gainX;
    this.gainY = gainY;
    this.probeMetres = probeMetres;
  }

  /** The stretches between two moments, in nanoseconds since the first electron. */
  List<Stretch> stretches(long fromNanos, long toNanos, double amperes) {
    if (run.scan() instanceof SpotScan spot) {
      return toNanos > fromNanos ? List.of(spot(spot, fromNanos, toNanos, amperes)) : List.of();
    }
    RasterScan raster = (RasterScan) run.scan();
    List<Stretch> all = new ArrayList<>(pixels(raster, fromNanos, toNanos, amperes));
    long flown =
        path.beamOnNanos(toNanos)
            - path.beamOnNanos(fromNanos)
            - (path.pixelNanos(toNanos) - path.pixelNanos(fromNanos));
    if (flown > 0) {
      all.add(flyback(raster, fromNanos, toNanos, flown, amperes));
    }
    return all;
  }

  /** Whole lines in one rectangle; the parts of lines before and after each in one of their own. */
  private List<Stretch> pixels(RasterScan raster, long fromNanos, long toNanos, double amperes) {
    long line = raster.lineBeamOn().toNanos();
    long end = path.pixelNanos(toNanos);
    List<Stretch> pieces = new ArrayList<>();
    long at = path.pixelNanos(fromNanos);
    while (at < end) {
      long row = at / line;
      long next = (row + 1) * line;
      if (at % line == 0 && end >= next) {
        next = end / line * line;
      }
      next = Math.min(next, end);
      pieces.add(piece(raster, at, next, amperes));
      at = next;
    }
    return pieces;
  }

  private Stretch piece(RasterScan raster, long at, long next, double amperes) {
    long line = raster.lineBeamOn().toNanos();
    long row = at / line;
    boolean whole = at % line == 0 && next % line == 0;
    long rows = whole ? (next - at) / line : 1;
    double left = whole ? 0 : (at % line) / (double) line;
    double width = whole ? 1 : (next - at) / (double) line;
    return stretch(
        Stretch.Shape.RECTANGLE,
        area(raster, row, rows, left, width),
        moment(raster, at, false),
        moment(raster, next, true),
        next - at,
        amperes);
  }

  private Stretch flyback(RasterScan raster, long from, long to, long flown, double amperes) {
    long line = raster.lineBeamOn().toNanos();
    long first = Math.min(path.pixelNanos(from) / line, raster.rowCount() - 1L);
    long count = Math.max(1, (path.pixelNanos(to) + line - 1) / line - first);
    return stretch(Stretch.Shape.STRIP, area(raster, first, count, 0, 1), from, to, flown, amperes);
  }

  /** Some lines, or a part of one, as they really lie; parts are given as shares of the width. */
  private Rectangle area(RasterScan raster, long row, long rows, double left, double width) {
    Rectangle frame = raster.frame();
    double pitch = raster.pitchYMetres();
    double middleX = (left + width / 2 - 0.5) * frame.widthMetres();
    double middleY = frame.heightMetres() / 2 - (raster.firstRow() + row + rows / 2.0) * pitch;
    Point centre = frame.at(middleX * gainX, middleY * gainY);
    return new Rectangle(
        centre.plus(shift.xMetres(), shift.yMetres()),
        width * frame.widthMetres() * gainX,
        rows * pitch * gainY,
        frame.turnDegrees());
  }

  /** Nanoseconds since the first electron at which so much time was spent in pixels. */
  private static long moment(RasterScan raster, long pixelNanos, boolean ending) {
    long line = raster.lineBeamOn().toNanos();
    long full = pixelNanos / line;
    long rest = pixelNanos % line;
    if (ending && rest == 0) {
      full--;
      rest = line;
    }
    return full * (line + raster.flyback().toNanos()) + rest;
  }

  private Stretch spot(SpotScan spot, long from, long to, double amperes) {
    Point place = spot.at().plus(shift.xMetres(), shift.yMetres());
    return made(
        Stretch.Shape.SPOT, place, probeMetres, probeMetres, 0, from, to, to - from, amperes);
  }

  private Stretch stretch(
      Stretch.Shape shape, Rectangle area, long from, long to, long beamOnNanos, double amperes) {
    return made(
        shape,
        area.centre(),
        area.widthMetres(),
        area.heightMetres(),
        area.turnDegrees(),
        from,
        to,
        beamOnNanos,
        amperes);
  }

  private Stretch made(
      Stretch.Shape shape,
      Point centre,
      double width,
      double height,
      double turn,
      long from,
      long to,
      long beamOnNanos,
      double amperes) {
    Instant first = run.firstElectron();
    return new Stretch(
        first.plusNanos(from),
        first.plusNanos(to),
        OptionalLong.of(run.grant()),
        run.fence(),
        run.sample(),
        shape,
        centre,
        width,
        height,
        turn,
        new Current(amperes).electronsIn(Duration.ofNanos(beamOnNanos)),
        amperes);
  }
}
