package beamwarden.quantity;

import java.math.BigDecimal;
import java.math.MathContext;

/** Prints a value with the SI prefix that keeps its number between 1 and 1000. */
final class Prefixed {
  private static final String[] PREFIXES = {"p", "n", "u", "m", "", "k", "M", "G"};
  private static final int PREFIX_OF_ONE = 4;
  private static final MathContext FOUR_DIGITS = new MathContext(4);

  private Prefixed() {}

  static String print(double value, String unit) {
    if (value == 0) {
      return "0 " + unit;
    }
    int thousands = (int) Math.floor(Math.log10(Math.abs(value)) / 3 + 1e-12);
    int index = Math.max(0, Math.min(PREFIXES.length - 1, thousands + PREFIX_OF_ONE));
    double scaled = value / Math.pow(1000, index - PREFIX_OF_ONE);
    String number = new BigDecimal(scaled).round(FOUR_DIGITS).stripTrailingZeros().toPlainString();
    return number + " " + PREFIXES[index] + unit;
  }
}
