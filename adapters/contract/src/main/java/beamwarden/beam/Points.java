package beamwarden.beam;

import java.util.List;

/**
 * Places where the probe rests.
 *
 * @param places at least one, in the order in which they are visited
 */
public record Points(List<Point> places) implements Region {
  /** Refuses an empty list. */
  public Points {
    places = List.copyOf(places);
    if (places.isEmpty()) {
      throw new IllegalArgumentException("a region of points needs at least one point");
    }
  }
}
