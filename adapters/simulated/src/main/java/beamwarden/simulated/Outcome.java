package beamwarden.simulated;

import beamwarden.quantity.Current;

/**
 * What a scan came to, as the scan engine and the current monitor tell it.
 *
 * @param reach how far it came
 * @param lowest the lowest current the monitor showed; it never shows more than flowed at the least
 * @param highest the highest current the monitor showed; it never shows less than flowed at the
 *     most
 */
record Outcome(BeamPath.Reach reach, Current lowest, Current highest) {}
