package beamwarden.kit;

import beamwarden.quantity.Current;
import java.time.Instant;
import java.util.OptionalLong;

/**
 * Beam that reached a sample, as a record that does not depend on the adapter's word has it.
 *
 * @param grant the grant under which it flowed; empty when nobody granted it, or the record cannot
 *     say
 * @param began the first electron, on the rig's line of time
 * @param ended the last electron
 * @param electrons how many reached the sample
 * @param highestCurrent the highest current that flowed
 * @param units into how many units of the scan any electron went (lines, or nanoseconds at a
 *     point); empty when the record cannot say
 */
public record Stretch(
    OptionalLong grant,
    Instant began,
    Instant ended,
    double electrons,
    Current highestCurrent,
    OptionalLong units) {

  /** The shortest time in which so many electrons can have flowed, in seconds: N·e/I. */
  double beamOnSeconds() {
    return electrons == 0
        ? 0
        : electrons * Current.ELEMENTARY_CHARGE_COULOMBS / highestCurrent.amperes();
  }
}
