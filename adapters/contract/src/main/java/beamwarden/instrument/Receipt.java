package beamwarden.instrument;

import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * What an adapter hands back for a grant: raw facts, from which the ledger books its own values.
 *
 * @param grant the grant's number
 * @param fence the grant's fencing number
 * @param unitsDone units (lines, or nanoseconds at a point) whose data is whole, from the first on
 * @param unitsTouched units into which any electron was sent, at least {@code unitsDone}
 * @param beamOn the longest time the beam can have been on
 * @param lowestCurrent the lowest current seen while the beam was on, where it was watched
 * @param highestCurrent the highest current seen while the beam was on, where it was watched
 * @param counts counts by detector or filter
 * @param files the data files, already forced to disk
 * @param fault what ended it early; empty when it ran to its end or was asked to stop
 */
public record Receipt(
    long grant,
    long fence,
    long unitsDone,
    long unitsTouched,
    Duration beamOn,
    Optional<CurrentReading> lowestCurrent,
    Optional<CurrentReading> highestCurrent,
    Map<String, Long> counts,
    List<DataFile> files,
    Optional<Fault> fault) {
  /** Copies the collections and refuses counts of units that cannot be. */
  public Receipt {
    counts = Map.copyOf(counts);
    files = List.copyOf(files);
    if (unitsDone < 0 || unitsTouched < unitsDone || beamOn.isNegative()) {
      throw new IllegalArgumentException(
          "a receipt cannot say "
              + unitsDone
              + " units done of "
              + unitsTouched
              + " touched in "
              + beamOn);
    }
  }

  /** Whether the exposure ran to its end. */
  public boolean complete(long units) {
    return unitsDone == units;
  }
}
