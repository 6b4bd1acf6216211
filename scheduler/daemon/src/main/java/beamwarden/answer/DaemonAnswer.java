package beamwarden.answer;

import com.fasterxml.jackson.annotation.JsonProperty;

/**
 * What does not change while a daemon runs.
 *
 * @param store the store's folder; whoever may read the token in it may make changes
 * @param profileHash the SHA-256 of the profile's document
 */
public record DaemonAnswer(
    @JsonProperty("store") String store, @JsonProperty("profile_sha256") String profileHash) {}
