package beamwarden.instrument;

import beamwarden.quantity.Length;

/**
 * A band of wavelengths that a filter lets pass.
 *
 * @param shortest its shortest wavelength
 * @param longest its longest wavelength
 */
public record Filter(Length shortest, Length longest) {}
