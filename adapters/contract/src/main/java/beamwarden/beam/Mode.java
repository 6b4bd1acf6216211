package beamwarden.beam;

import java.util.Locale;
import java.util.Optional;

/** The kinds of acquisition. The set is closed: engine, adapters and documents know all six. */
public enum Mode {
  /** A raster of the electron detector. */
  ELECTRON_IMAGE,
  /** A raster of light through one filter at a time, or of all of it (panchromatic). */
  INTENSITY_MAP,
  /** A raster with a spectrum at each pixel. */
  SPECTRAL_MAP,
  /** The directions and polarisation of the light from a point, taken by a camera. */
  ANGULAR_PATTERN,
  /** Coincidences between photons, g2, from a point in time slices. */
  PHOTON_CORRELATION,
  /** Decay of the light after a pulse, at points or as a raster (a lifetime map). */
  DECAY_TRACE;

  /** The mode's name in documents: lower case with hyphens. */
  public String text() {
    return name().toLowerCase(Locale.ROOT).replace('_', '-');
  }

  /** The mode of that name in documents, or empty. */
  public static Optional<Mode> named(String text) {
    for (Mode mode : values()) {
      if (mode.text().equals(text)) {
        return Optional.of(mode);
      }
    }
    return Optional.empty();
  }
}
