package beamwarden.beam;

import java.time.Duration;

/**
 * Some whole lines of a stepped raster.
 *
 * @param frame the outline of the whole raster: pixel pitch times pixel count on each axis
 * @param columns pixels along the frame's width, at least 1
 * @param rows lines of the whole raster, at least 1; line 0 is at the top of the frame
 * @param firstRow the first line of this scan, 0 to {@code rows - 1}
 * @param rowCount how many lines this scan has, at least 1
 * @param dwell the time on each pixel, above zero
 * @param flyback the time between two lines, during which a fast blanker keeps the beam off
 */
public record RasterScan(
    Rectangle frame,
    int columns,
    int rows,
    int firstRow,
    int rowCount,
    Duration dwell,
    Duration flyback)
    implements Scan {
  /** Refuses lines outside the frame and times that make no sense. */
  public RasterScan {
    if (columns < 1 || rows < 1) {
      throw new IllegalArgumentException("a raster needs at least one pixel");
    }
    if (firstRow < 0 || rowCount < 1 || firstRow > rows - rowCount) {
      throw new IllegalArgumentException(
          "lines " + firstRow + " to " + (firstRow + rowCount) + " are not within 0 to " + rows);
    }
    if (dwell.isZero() || dwell.isNegative() || flyback.isNegative()) {
      throw new IllegalArgumentException("a raster needs a dwell above zero");
    }
  }

  /** The time the beam is on during one line. */
  public Duration lineBeamOn() {
    return dwell.multipliedBy(columns);
  }

  @Override
  public Duration beamOn() {
    return lineBeamOn().multipliedBy(rowCount);
  }

  @Override
  public Duration duration() {
    return lineBeamOn().plus(flyback).multipliedBy(rowCount);
  }

  @Override
  public long units() {
    return rowCount;
  }

  /** The outline of some lines of the frame. */
  public Rectangle strip(int first, int count) {
    double pitch = frame.heightMetres() / rows;
    double middle = frame.heightMetres() / 2 - (first + count / 2.0) * pitch;
    return new Rectangle(
        frame.at(0, middle), frame.widthMetres(), count * pitch, frame.turnDegrees());
  }

  /** The pixel pitch along a line, in metres. */
  public double pitchXMetres() {
    return frame.widthMetres() / columns;
  }

  /** The distance from line to line, in metres. */
  public double pitchYMetres() {
    return frame.heightMetres() / rows;
  }
}
