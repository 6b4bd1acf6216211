package beamwarden.quantity;

/** The one check that every quantity makes of its number. */
final class Finite {
  private Finite() {}

  static void require(String what, double value) {
    if (!Double.isFinite(value)) {
      throw new IllegalArgumentException("a " + what + " must be a finite number, not " + value);
    }
  }
}
