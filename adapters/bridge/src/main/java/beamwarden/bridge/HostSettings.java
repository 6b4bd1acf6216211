package beamwarden.bridge;

import beamwarden.instrument.Abilities;
import java.util.Map;

/**
 * What a hosted adapter needs to know: the content of the host's settings file.
 *
 * @param abilities what the profile says of the instrument
 * @param options anything else, by name
 */
record HostSettings(Abilities abilities, Map<String, String> options) {
  HostSettings {
    options = Map.copyOf(options);
  }
}
