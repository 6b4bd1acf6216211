package beamwarden.answer;

import beamwarden.beam.Point;
import java.util.List;

/** How places are answered. */
final class Places {
  private Places() {}

  /** x and y in metres, on the sample. */
  static List<Double> metres(Point place) {
    return List.of(place.xMetres(), place.yMetres());
  }
}
