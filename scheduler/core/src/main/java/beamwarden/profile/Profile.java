package beamwarden.profile;

import beamwarden.instrument.Abilities;
import beamwarden.shift.ShiftRule;
import java.time.Duration;
import java.time.ZoneId;
import java.util.List;
import java.util.Map;

/**
 * The instrument profile: what one instrument can do and guarantees, and how the lab uses it.
 *
 * @param abilities what it can do and guarantees
 * @param adapter the name of the adapter that drives it
 * @param options what the adapter is told besides, by name
 * @param zone the lab's time zone
 * @param windDown the wind-down before a shift closes, unless the shift says otherwise
 * @param shifts the rules from which shifts are made
 * @param retries how often one exposure is tried again after a fault, zero or more
 */
public record Profile(
    Abilities abilities,
    String adapter,
    Map<String, String> options,
    ZoneId zone,
    Duration windDown,
    List<ShiftRule> shifts,
    int retries) {
  /** Copies the collections. */
  public Profile {
    options = Map.copyOf(options);
    shifts = List.copyOf(shifts);
  }
}
