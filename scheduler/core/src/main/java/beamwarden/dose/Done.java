package beamwarden.dose;

import java.util.HashMap;
import java.util.Map;

/**
 * How much of a job is done: for each pass, how many units from its first on.
 *
 * @param unitsByPass units done by the number of the pass; a pass that is missing has none
 */
public record Done(Map<Integer, Long> unitsByPass) {
  /** Nothing is done. */
  public static final Done NOTHING = new Done(Map.of());

  /** Copies the map. */
  public Done {
    unitsByPass = Map.copyOf(unitsByPass);
  }

  /** Units done of a pass. */
  public long units(int pass) {
    return unitsByPass.getOrDefault(pass, 0L);
  }

  /** This, and more units of one pass. */
  public Done plus(int pass, long units) {
    Map<Integer, Long> sum = new HashMap<>(unitsByPass);
    sum.merge(pass, units, Long::sum);
    return new Done(sum);
  }
}
