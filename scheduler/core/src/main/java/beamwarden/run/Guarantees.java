package beamwarden.run;

import beamwarden.instrument.Abilities;
import beamwarden.instrument.CurrentMeter;
import java.time.Duration;
import java.util.Optional;

/** Compares what an instrument says it guarantees with what its profile says. */
final class Guarantees {
  private Guarantees() {}

  /** One sentence when the instrument guarantees less than the profile, or empty. */
  static Optional<String> weaker(Abilities profile, Abilities reported) {
    CurrentMeter meter = profile.meter();
    CurrentMeter told = reported.meter();
    String what = null;
    if (told.tolerance() > meter.tolerance() || told.floor().compareTo(meter.floor()) > 0) {
      what = "current meter";
    } else if (told.drift() > meter.drift()) {
      what = "current drift";
    } else if (reported.field().calibration() > profile.field().calibration()) {
      what = "scan calibration";
    } else if (reported.stage().repeatabilityMetres() > profile.stage().repeatabilityMetres()) {
      what = "stage repeatability";
    } else if (blanking(reported).compareTo(blanking(profile)) > 0) {
      what = "blanking time";
    }
    return Optional.ofNullable(what)
        .map(
            name ->
                "the instrument guarantees less than its profile for its "
                    + name
                    + "; correct the profile and start again");
  }

  private static Duration blanking(Abilities abilities) {
    return abilities.blanker().alone().orElse(Duration.ofDays(1));
  }
}
