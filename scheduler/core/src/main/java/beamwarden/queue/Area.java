package beamwarden.queue;

import beamwarden.beam.Rectangle;

/**
 * A named part of a sample.
 *
 * @param name its name, once in a sample
 * @param outline where it lies
 * @param use what it is there for
 */
public record Area(String name, Rectangle outline, Use use) {
  /** What an area is there for. */
  public enum Use {
    /** It has caps of its own beside the sample's. */
    CAPPED,
    /** It must receive nothing: a fluence cap of zero. */
    KEEP_OUT,
    /** It may be spent: the sample's fluence caps do not hold in it, its own charge cap does. */
    SACRIFICIAL
  }
}
