package beamwarden.instrument;

import java.time.Duration;
import java.util.OptionalDouble;

/**
 * The limits of one mode.
 *
 * @param shortestDwell the shortest time on a pixel, or of a time slice
 * @param longestDwell the longest time on a pixel, or of a time slice
 * @param fieldMetres the longest side of a raster in this mode, where it is less than the field's
 * @param flyback the time between two lines
 * @param frameStart the time before a pass begins
 * @param stopsAt where an exposure may end when it is asked to stop
 */
public record ModeAbility(
    Duration shortestDwell,
    Duration longestDwell,
    OptionalDouble fieldMetres,
    Duration flyback,
    Duration frameStart,
    Boundary stopsAt) {
  /** Where an exposure may end and be taken up again. */
  public enum Boundary {
    /** After any line of a raster. */
    LINE,
    /** After a point. */
    POINT,
    /** After a camera frame. */
    FRAME,
    /** After a time slice. */
    SLICE
  }
}
