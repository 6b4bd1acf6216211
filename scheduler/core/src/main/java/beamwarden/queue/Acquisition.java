package beamwarden.queue;

import beamwarden.beam.Mode;
import java.time.Duration;
import java.util.List;
import java.util.OptionalLong;

/** How a job looks at its region. */
public sealed interface Acquisition {
  /** The mode. */
  Mode mode();

  /**
   * A raster, or several passes of one.
   *
   * @param mode the mode
   * @param columns pixels along the width, of each tile
   * @param rows lines, of each tile
   * @param dwell the time on each pixel, per pass
   * @param filters the filter of each pass of a frame, at least one; {@code panchromatic} for none
   * @param frames how many times the whole set of passes is made, at least 1
   */
  record Raster(Mode mode, int columns, int rows, Duration dwell, List<String> filters, int frames)
      implements Acquisition {
    /** Copies the filters and refuses an empty raster. */
    public Raster {
      filters = List.copyOf(filters);
      if (columns < 1 || rows < 1 || frames < 1 || filters.isEmpty()) {
        throw new IllegalArgumentException(
            "a raster needs pixels, a frame and a filter or panchromatic");
      }
    }
  }

  /**
   * A rest at each point of the region.
   *
   * @param mode the mode
   * @param longest the longest time at each point, above zero
   * @param coincidences the number of coincidences after which a point is done sooner, if any
   */
  record Spot(Mode mode, Duration longest, OptionalLong coincidences) implements Acquisition {}
}
