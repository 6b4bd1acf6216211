package beamwarden.clockwork;

import java.time.Duration;
import java.time.InstantSource;
import java.util.function.Supplier;

/**
 * The machine's wall clock, by which Quartz goes.
 *
 * @param time what it shows
 * @param ahead how far it has run ahead of elapsed time so far; a change means that it was set
 */
public record WallClock(InstantSource time, Supplier<Duration> ahead) {}
