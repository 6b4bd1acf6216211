/**
 * Wakes the engine when something is due, by way of Quartz: a shift that opens or closes, the
 * wind-down, a heartbeat, a retry.
 *
 * <p>{@link beamwarden.clockwork.QuartzClock} holds one timer for each reason and a watchdog. Its
 * timers are hints that are derived anew from the books after every step; they are neither kept nor
 * relied on for order. Quartz's types stay in this package.
 *
 * <p>May import {@code timing}.
 */
package beamwarden.clockwork;
