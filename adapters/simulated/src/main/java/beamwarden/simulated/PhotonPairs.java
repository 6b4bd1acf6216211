package beamwarden.simulated;

import beamwarden.quantity.Current;

/**
 * Expected counts of a photon correlation: two detectors behind a splitter that halves the light.
 *
 * <p>Accidental pairs in a bin: n = R1·R2·δt·T (R1, R2 the rates of the two detectors, δt the bin,
 * T the time); uncorrelated events. Under a continuous beam light is bunched, g2(t) = 1 +
 * e/(2·I·τ·γ) · exp(-|t|/τ), with τ the emission's lifetime and γ the part of the electrons that
 * excite: the form that Meuret et al. published in 2015 ("Photon bunching in cathodoluminescence")
 * and that follows from electrons, excitations and photons that are all Poisson. τ, γ and the bin
 * are invented.
 */
record PhotonPairs(double photonsPerSecond, double amperes, double seconds) {
  /** The width of a bin. */
  static final double BIN_SECONDS = 256e-12;

  /** The emission's lifetime. */
  static final double LIFETIME_SECONDS = 1e-9;

  /** The part of the electrons that excite. */
  static final double EXCITING = 0.13;

  private static final double ELEMENTARY_CHARGE_COULOMBS = Current.ELEMENTARY_CHARGE_COULOMBS;

  /** Pairs expected in the bin at a long delay, where nothing is correlated. */
  double atLongDelay() {
    double each = photonsPerSecond / 2;
    return each * each * BIN_SECONDS * seconds;
  }

  /** Pairs expected in the bin at delay zero, bunching included. */
  double atZeroDelay() {
    return atLongDelay() * (1 + bunching());
  }

  /** g2(0) - 1. */
  double bunching() {
    return amperes > 0
        ? ELEMENTARY_CHARGE_COULOMBS / (2 * amperes * LIFETIME_SECONDS * EXCITING)
        : 0;
  }
}
