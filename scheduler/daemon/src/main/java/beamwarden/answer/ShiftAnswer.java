package beamwarden.answer;

import beamwarden.shift.Shift;
import com.fasterxml.jackson.annotation.JsonProperty;
import java.time.Instant;
import java.util.Optional;

/**
 * A shift.
 *
 * @param opens when it opens
 * @param closes when it closes
 * @param windDownSeconds how long before it closes the wind-down begins
 * @param unattended whether nobody is there
 * @param latestStart after this moment no exposure starts, if any
 */
public record ShiftAnswer(
    @JsonProperty("opens") Instant opens,
    @JsonProperty("closes") Instant closes,
    @JsonProperty("wind_down_s") double windDownSeconds,
    @JsonProperty("unattended") boolean unattended,
    @JsonProperty("latest_start") Optional<Instant> latestStart) {
  static ShiftAnswer of(Shift shift) {
    return new ShiftAnswer(
        shift.opens(),
        shift.closes(),
        GrantAnswer.seconds(shift.windDown()),
        shift.unattended(),
        shift.latestStart());
  }
}
