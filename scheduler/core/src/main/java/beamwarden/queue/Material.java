package beamwarden.queue;

/**
 * What a sample is made of.
 *
 * @param formula its chemical formula, such as {@code SiO2}
 * @param gramsPerCubicCentimetre its density, above zero
 */
public record Material(String formula, double gramsPerCubicCentimetre) {
  /** Refuses a density of zero or below. */
  public Material {
    if (!(gramsPerCubicCentimetre > 0)) {
      throw new IllegalArgumentException(
          "a density must be above zero, not " + gramsPerCubicCentimetre + " g/cm3");
    }
  }
}
