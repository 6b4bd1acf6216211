package beamwarden.system.bad.left;

/** What the other package needs to close the circle. */
public final class Half {}
