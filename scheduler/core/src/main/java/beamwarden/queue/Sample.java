package beamwarden.queue;

import beamwarden.beam.Placement;
import java.util.List;
import java.util.Optional;

/**
 * A sample on the holder, and what its owner allows it to receive.
 *
 * @param id its id, the same in every queue and every night
 * @param label what a person calls it
 * @param material what it is made of, where that is known
 * @param placement where it sits on the holder
 * @param areas named parts of it, each name once
 * @param caps limits on its cumulative dose, all nights together
 */
public record Sample(
    String id,
    String label,
    Optional<Material> material,
    Placement placement,
    List<Area> areas,
    List<Cap> caps) {
  /** Copies the lists. */
  public Sample {
    areas = List.copyOf(areas);
    caps = List.copyOf(caps);
  }

  /** The area of that name. */
  public Optional<Area> area(String name) {
    return areas.stream().filter(area -> area.name().equals(name)).findFirst();
  }
}
