package beamwarden.dose;

import beamwarden.beam.Point;
import beamwarden.quantity.Length;
import beamwarden.queue.Cap;
import java.math.BigDecimal;
import java.math.MathContext;

/** How figures are said in a sentence: digits enough to tell a value from the cap it passes. */
final class Texts {
  private static final MathContext SEVEN_DIGITS = new MathContext(7);

  private Texts() {}

  static String place(Point at) {
    return "[" + new Length(at.xMetres()) + ", " + new Length(at.yMetres()) + "]";
  }

  static String fluence(double electronsPerSquareNanometre) {
    return digits(electronsPerSquareNanometre) + " e/nm2";
  }

  static String charge(double coulombs) {
    return digits(coulombs * 1e6) + " uC";
  }

  /** A cap with its limit and where it holds. */
  static String cap(Cap cap) {
    String limit =
        cap instanceof Cap.OnFluence onFluence
            ? fluence(onFluence.limit().electronsPerSquareNanometre())
            : charge(((Cap.OnCharge) cap).limit().coulombs());
    return "cap of " + limit + cap.area().map(area -> " on the area " + area).orElse("");
  }

  private static String digits(double value) {
    if (value == 0) {
      return "0";
    }
    return new BigDecimal(value).round(SEVEN_DIGITS).stripTrailingZeros().toPlainString();
  }
}
