package beamwarden.run;

import beamwarden.ledger.Entry.GrantOpened;

/**
 * An exposure that is being made.
 *
 * @param opened the entry with which its grant was stored
 * @param unitsDone units done so far, as the instrument last said
 */
public record Exposing(GrantOpened opened, long unitsDone) {}
