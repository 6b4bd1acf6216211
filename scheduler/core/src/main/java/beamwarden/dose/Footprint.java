package beamwarden.dose;

/**
 * The part of a sample's plane that a pass covers, with its fluence.
 *
 * @param box the outline, along the axes of the sum that it is made for
 * @param fluence in e/nm², zero or more
 */
record Footprint(Box box, double fluence) {}
