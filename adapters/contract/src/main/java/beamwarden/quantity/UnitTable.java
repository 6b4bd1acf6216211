package beamwarden.quantity;

import java.math.BigDecimal;
import java.text.Normalizer;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * Every unit that may be written, and what one of it is in the one unit of its dimension.
 *
 * <p>The table is closed: a unit that is not in it is refused. Prefixes are those of the SI
 * Brochure (9th edition, table 7) from femto to tera, with {@code u} beside the two characters that
 * look like a micro sign.
 */
final class UnitTable {
  /** Femto to tera; the empty prefix included. */
  private static final Map<String, Integer> PREFIXES =
      Map.of("f", -15, "p", -12, "n", -9, "u", -6, "m", -3, "", 0, "k", 3, "M", 6, "G", 9, "T", 12);

  private static final Map<String, Unit> UNITS = new LinkedHashMap<>();

  static {
    prefixed("m", Dimension.LENGTH);
    add("cm", Dimension.LENGTH, power(-2));
    add("Å", Dimension.LENGTH, power(-10));
    for (String prefix : new String[] {"f", "p", "n", "u", "m", ""}) {
      add(prefix + "s", Dimension.TIME, power(PREFIXES.get(prefix)));
    }
    add("min", Dimension.TIME, BigDecimal.valueOf(60));
    add("h", Dimension.TIME, BigDecimal.valueOf(3600));
    prefixed("A", Dimension.CURRENT);
    prefixed("V", Dimension.VOLTAGE);
    prefixed("C", Dimension.CHARGE);
    prefixed("Gy", Dimension.ABSORBED_DOSE);
    prefixed("Hz", Dimension.FREQUENCY);
    fluences();
    add("g/cm3", Dimension.DENSITY, BigDecimal.ONE);
    add("kg/m3", Dimension.DENSITY, power(-3));
    add("deg", Dimension.ANGLE, BigDecimal.ONE);
    add("°", Dimension.ANGLE, BigDecimal.ONE);
    add("%", Dimension.RATIO, power(-2));
    for (String prefix : new String[] {"n", "u", "m", ""}) {
      add(prefix + "m/s", Dimension.SPEED, power(PREFIXES.get(prefix)));
      add(prefix + "m/s2", Dimension.ACCELERATION, power(PREFIXES.get(prefix)));
    }
    add("/mm", Dimension.LINE_DENSITY, power(3));
    add("/um", Dimension.LINE_DENSITY, power(6));
    add("/m", Dimension.LINE_DENSITY, BigDecimal.ONE);
  }

  private UnitTable() {}

  /** Electrons per area, and charge per area: 1 C/m² is 1/(e·10¹⁸) e/nm², e the charge in C. */
  private static void fluences() {
    add("e/nm2", Dimension.FLUENCE, BigDecimal.ONE);
    add("e/um2", Dimension.FLUENCE, power(-6));
    add("e/Å2", Dimension.FLUENCE, power(2));
    add("e/A2", Dimension.FLUENCE, power(2));
    BigDecimal squareMetre = new BigDecimal("1.602176634e-19").multiply(power(18));
    for (String prefix : new String[] {"n", "u", "m", ""}) {
      BigDecimal factor = power(PREFIXES.get(prefix));
      add(prefix + "C/m2", Dimension.FLUENCE, factor, squareMetre);
      add(prefix + "C/cm2", Dimension.FLUENCE, factor.multiply(power(4)), squareMetre);
    }
  }

  /** The unit of that symbol, or empty. */
  static Optional<Unit> unit(String written) {
    return Optional.ofNullable(UNITS.get(plain(written)));
  }

  /** The one unit of that dimension whose symbol differs in upper and lower case only, or empty. */
  static Optional<Unit> inOtherCase(String written, Dimension dimension) {
    String plain = plain(written);
    List<Unit> alike =
        units().stream()
            .filter(unit -> unit.dimension() == dimension)
            .filter(unit -> unit.symbol().equalsIgnoreCase(plain))
            .toList();
    return alike.size() == 1 ? Optional.of(alike.get(0)) : Optional.empty();
  }

  static Collection<Unit> units() {
    return UNITS.values();
  }

  /** The symbol with ASCII signs where there are any: µ as u, ² and ^2 as 2, one kind of Å. */
  private static String plain(String written) {
    return Normalizer.normalize(written, Normalizer.Form.NFC)
        .replace('\u00b5', 'u')
        .replace('\u03bc', 'u')
        .replace('\u00b2', '2')
        .replace('\u00b3', '3')
        .replace("^", "");
  }

  private static void prefixed(String symbol, Dimension dimension) {
    PREFIXES.forEach((prefix, exponent) -> add(prefix + symbol, dimension, power(exponent)));
  }

  private static void add(String symbol, Dimension dimension, BigDecimal factor) {
    add(symbol, dimension, factor, BigDecimal.ONE);
  }

  private static void add(
      String symbol, Dimension dimension, BigDecimal factor, BigDecimal divisor) {
    Unit before = UNITS.put(symbol, new Unit(symbol, dimension, factor, divisor));
    if (before != null) {
      throw new IllegalStateException("two units are written " + symbol);
    }
  }

  private static BigDecimal power(int exponent) {
    return BigDecimal.ONE.scaleByPowerOfTen(exponent);
  }
}
