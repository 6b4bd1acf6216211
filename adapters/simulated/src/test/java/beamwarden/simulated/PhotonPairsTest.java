package beamwarden.simulated;

import static org.junit.jupiter.api.Assertions.assertEquals;

import org.junit.jupiter.api.Test;

/** Photon pairs against published and hand-computed values. */
class PhotonPairsTest {
  @Test
  void accidentalsAreTheProductOfTheRates() {
    // 1e5 /s at each of two detectors for 1000 s; in 0.5 ns n = 5000 (R1·R2·δt·T), here 256 ps.
    assertEquals(5000 * 0.256 / 0.5, new PhotonPairs(2e5, 1e-10, 1000).atLongDelay(), 1e-9);
  }

  @Test
  void bunchingFallsWithTheCurrent() {
    // g2(0) - 1 = e/(2·I·τ·γ) at τ 1 ns, γ 0.13: 61.622 at 10 pA, 6.1622 at 100 pA, 0.61622 at 1
    // nA.
    assertEquals(61.622, new PhotonPairs(1, 10e-12, 1).bunching(), 5e-4);
    assertEquals(6.1622, new PhotonPairs(1, 100e-12, 1).bunching(), 5e-5);
    assertEquals(0.61622, new PhotonPairs(1, 1e-9, 1).bunching(), 5e-6);
  }

  @Test
  void pairsAtZeroDelayHoldTheBunching() {
    PhotonPairs pairs = new PhotonPairs(2e5, 1e-9, 1000);
    assertEquals(1.61622, pairs.atZeroDelay() / pairs.atLongDelay(), 5e-6);
  }
}
