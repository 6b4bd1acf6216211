package beamwarden.simulated;

import java.util.Locale;
import java.util.Optional;

/** What can be made to go wrong. */
public enum Mishap {
  /** The detector does not answer. */
  DETECTOR_TIMEOUT,
  /** The connection is cut; the adapter lives on and hears nothing until it is connected again. */
  LOST_CONNECTION,
  /** The current rises above the highest that was granted. */
  CURRENT_OUT_OF_BOUNDS,
  /** The high voltage trips. */
  HIGH_VOLTAGE_TRIP,
  /** Somebody opens the chamber's door. */
  DOOR_OPENED,
  /** The adapter's process ends without warning; the hardware goes on. */
  PROCESS_DIES;

  /** Its name in scripts: lower case with hyphens. */
  public String text() {
    return name().toLowerCase(Locale.ROOT).replace('_', '-');
  }

  static Optional<Mishap> named(String text) {
    for (Mishap mishap : values()) {
      if (mishap.text().equals(text)) {
        return Optional.of(mishap);
      }
    }
    return Optional.empty();
  }
}
