package beamwarden.quantity;

import java.math.BigDecimal;
import java.math.MathContext;

/** A unit that may be written. */
final class Unit {
  private final String symbol;
  private final Dimension dimension;
  private final BigDecimal factor;
  private final BigDecimal divisor;

  /**
   * A unit.
   *
   * @param symbol how it is written, with ASCII signs where there are any
   * @param dimension what it measures
   * @param factor what one of it is in the unit of the dimension, before {@code divisor}
   * @param divisor what that is divided by, so that only the last step rounds
   */
  Unit(String symbol, Dimension dimension, BigDecimal factor, BigDecimal divisor) {
    this.symbol = symbol;
    this.dimension = dimension;
    this.factor = factor;
    this.divisor = divisor;
  }

  String symbol() {
    return symbol;
  }

  Dimension dimension() {
    return dimension;
  }

  /** So many of this unit in the unit of its dimension; 34 digits where it must be divided. */
  BigDecimal convert(BigDecimal number) {
    BigDecimal product = number.multiply(factor);
    return divisor.compareTo(BigDecimal.ONE) == 0
        ? product
        : product.divide(divisor, MathContext.DECIMAL128);
  }
}
