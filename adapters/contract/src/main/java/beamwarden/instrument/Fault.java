package beamwarden.instrument;

/**
 * Something that went wrong at the instrument.
 *
 * @param kind what it was
 * @param message one sentence for a person
 */
public record Fault(FaultKind kind, String message) {}
