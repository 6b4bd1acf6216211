package beamwarden.dose;

import beamwarden.beam.Point;
import beamwarden.quantity.Fluence;

/**
 * The highest local fluence somewhere.
 *
 * @param fluence the fluence
 * @param at a place on the sample where it is reached
 */
public record LocalFluence(Fluence fluence, Point at) {}
