package beamwarden.instrument;

import beamwarden.timing.Timeline;
import java.nio.file.Path;
import java.util.Map;

/** Makes an adapter; found at run time through {@link java.util.ServiceLoader}. */
public interface AdapterProvider {
  /** The adapter's name in instrument profiles. */
  String name();

  /**
   * Opens the adapter; nothing is sent to the instrument before {@link Instrument#connect}.
   *
   * @param setting what it needs to know
   * @param time the line of time on which it lives
   */
  Instrument open(Setting setting, Timeline time);

  /**
   * What an adapter is given.
   *
   * @param abilities what the profile says of the instrument
   * @param folder a folder of its own, for its durable notes and its data
   * @param options anything else, by name
   */
  record Setting(Abilities abilities, Path folder, Map<String, String> options) {
    /** Copies the options. */
    public Setting {
      options = Map.copyOf(options);
    }
  }
}
