package beamwarden.report;

import java.time.Instant;

/**
 * Something that happened in a night and that a person should read.
 *
 * @param at when
 * @param kind what kind of thing: {@code fault}, {@code stopped}, {@code goes-on}, {@code
 *     approved}, {@code session}
 * @param text one sentence
 */
public record NightEvent(Instant at, String kind, String text) {}
