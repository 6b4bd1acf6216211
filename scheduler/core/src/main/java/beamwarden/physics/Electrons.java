package beamwarden.physics;

import beamwarden.quantity.Current;
import beamwarden.quantity.Length;
import beamwarden.quantity.Voltage;

/** Free electrons behind an accelerating voltage; constants as of SI 2019 and CODATA 2022. */
public final class Electrons {
  private static final double PLANCK_JOULE_SECONDS = 6.62607015e-34;
  private static final double LIGHT_METRES_PER_SECOND = 299792458;
  private static final double MASS_KILOGRAMS = 9.1093837139e-31;

  private Electrons() {}

  /** The rest energy m·c² in electronvolts. */
  public static double restEnergyElectronvolts() {
    return MASS_KILOGRAMS
        * LIGHT_METRES_PER_SECOND
        * LIGHT_METRES_PER_SECOND
        / Current.ELEMENTARY_CHARGE_COULOMBS;
  }

  /** The wavelength λ = h/√(2·m·eU·(1 + eU/(2·m·c²))), relativistic, for a voltage above zero. */
  public static Length wavelength(Voltage voltage) {
    double joules = voltage.volts() * Current.ELEMENTARY_CHARGE_COULOMBS;
    double relativistic = 1 + voltage.volts() / (2 * restEnergyElectronvolts());
    return new Length(PLANCK_JOULE_SECONDS / Math.sqrt(2 * MASS_KILOGRAMS * joules * relativistic));
  }

  /** The speed as a part of the speed of light: √(1 − (1 + eU/(m·c²))⁻²). */
  public static double speed(Voltage voltage) {
    double gamma = 1 + voltage.volts() / restEnergyElectronvolts();
    return Math.sqrt(1 - 1 / (gamma * gamma));
  }
}
