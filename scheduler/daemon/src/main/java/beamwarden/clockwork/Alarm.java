package beamwarden.clockwork;

import java.time.Instant;

/**
 * A moment at which the engine wants to be woken.
 *
 * @param reason why, such as {@code SHIFT_OPENS}; of alarms with the same reason only the earliest
 *     is kept
 * @param at the moment, on the engine's line of time
 */
public record Alarm(String reason, Instant at) {}
