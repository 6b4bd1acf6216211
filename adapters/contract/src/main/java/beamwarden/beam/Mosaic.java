package beamwarden.beam;

import java.util.ArrayList;
import java.util.List;

/**
 * Rectangles on a grid, each reached by a move of the stage, sharing a stated part of their sides.
 *
 * @param columns tiles side by side, at least 1
 * @param rows tiles one above the other, at least 1
 * @param tileWidthMetres the width of one tile, above zero
 * @param tileHeightMetres the height of one tile, above zero
 * @param overlap the part of a tile's side that neighbours share, 0 to below 0.5
 * @param centre the centre of the whole mosaic
 * @param turnDegrees how far the whole mosaic is turned counter-clockwise
 */
public record Mosaic(
    int columns,
    int rows,
    double tileWidthMetres,
    double tileHeightMetres,
    double overlap,
    Point centre,
    double turnDegrees)
    implements Region {
  /** Refuses a mosaic without tiles or with an overlap of half a tile or more. */
  public Mosaic {
    if (columns < 1 || rows < 1) {
      throw new IllegalArgumentException("a mosaic needs at least one tile");
    }
    if (!(overlap >= 0 && overlap < 0.5)) {
      throw new IllegalArgumentException(
          "a mosaic's overlap must be from 0 to below 0.5, not " + overlap);
    }
  }

  /** Tiles in serpentine order, first row from left to right, rows from the top down. */
  public List<Rectangle> tiles() {
    double stepX = tileWidthMetres * (1 - overlap);
    double stepY = tileHeightMetres * (1 - overlap);
    List<Rectangle> tiles = new ArrayList<>();
    for (int row = 0; row < rows; row++) {
      for (int step = 0; step < columns; step++) {
        int column = row % 2 == 0 ? step : columns - 1 - step;
        Point offset =
            new Point((column - (columns - 1) / 2.0) * stepX, ((rows - 1) / 2.0 - row) * stepY)
                .turned(turnDegrees);
        tiles.add(
            new Rectangle(
                centre.plus(offset.xMetres(), offset.yMetres()),
                tileWidthMetres,
                tileHeightMetres,
                turnDegrees));
      }
    }
    return List.copyOf(tiles);
  }
}
