package beamwarden.physics;

import beamwarden.quantity.Length;
import beamwarden.quantity.Voltage;

/**
 * How far electrons reach into a material: the range of Kanaya and Okayama (1972).
 *
 * <p>For an element R = 0.0276·A·E^1.67/(Z^0.89·ρ) µm with E in keV, A in g/mol and ρ in g/cm³; for
 * a compound 1/(ρR) is the sum of wᵢ/(ρR)ᵢ over its elements with mass parts wᵢ. The authors claim
 * agreement from 10 to 1000 keV; below 10 keV the formula extrapolates, and from 10 to 30 keV it
 * lies between 0.6 and 1.2 times the path length of the NIST tables, lower for heavy elements.
 */
public final class GenerationRange {
  private static final double MICROMETRES_AT_1_KEV = 0.0276;
  private static final double POWER_OF_ENERGY = 1.67;
  private static final double POWER_OF_NUMBER = 0.89;

  private final double metresAt1Kev;

  /** Of a material of that formula and density; the density in g/cm³, above zero. */
  public GenerationRange(Formula formula, double gramsPerCubicCentimetre) {
    if (!(gramsPerCubicCentimetre > 0)) {
      throw new IllegalArgumentException(
          "a density must be above zero, not " + gramsPerCubicCentimetre + " g/cm3");
    }
    double perMass =
        formula.massParts().entrySet().stream()
            .mapToDouble(part -> part.getValue() / massRangeAt1Kev(part.getKey()))
            .sum();
    metresAt1Kev = 1e-6 / (perMass * gramsPerCubicCentimetre);
  }

  /** The range at an accelerating voltage above zero; E0 = e·U. */
  public Length at(Voltage voltage) {
    return new Length(metresAt1Kev * Math.pow(voltage.volts() / 1000, POWER_OF_ENERGY));
  }

  /** ρR of one element at 1 keV, in µm·g/cm³. */
  private static double massRangeAt1Kev(Element element) {
    return MICROMETRES_AT_1_KEV * element.weight() / Math.pow(element.number(), POWER_OF_NUMBER);
  }
}
