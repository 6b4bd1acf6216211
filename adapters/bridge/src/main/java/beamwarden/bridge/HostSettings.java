package beamwarden.bridge;

import beamwarden.instrument.Abilities;
import beamwarden.timing.TimeAnchor;
import java.util.Map;

/**
 * What a hosted adapter needs to know: the content of the host's settings file.
 *
 * @param abilities what the profile says of the instrument
 * @param options anything else, by name
 * @param anchor the line of time on which the adapter lives
 */
record HostSettings(Abilities abilities, Map<String, String> options, TimeAnchor anchor) {
  HostSettings {
    options = Map.copyOf(options);
  }
}
