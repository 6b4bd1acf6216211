package beamwarden.quantity;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.time.Duration;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class QuantityTextTest {

  @Nested
  class Prefixes {

    /** Factors from the SI Brochure, 9th edition, table 7. */
    @ParameterizedTest
    @CsvSource({
      "1 fA, 1e-15",
      "1 pA, 1e-12",
      "1 nA, 1e-9",
      "1 uA, 1e-6",
      "1 mA, 1e-3",
      "1 A, 1",
      "1 kA, 1e3",
      "1 MA, 1e6",
      "1 GA, 1e9",
      "1 TA, 1e12"
    })
    void areThoseOfTheSiBrochure(String text, BigDecimal amperes) {
      assertEquals(0, amperes.compareTo(QuantityText.value(text, Dimension.CURRENT)));
    }

    @ParameterizedTest
    @ValueSource(strings = {"40 us", "40 \u00b5s", "40 \u03bcs", "40\u00a0us", " 40  us "})
    void readEveryMicroSignAndEveryBlank(String text) {
      assertEquals(Duration.ofNanos(40_000), QuantityText.duration(text));
    }
  }

  @Nested
  class Units {

    /** Minute, hour and degree: SI Brochure, 9th edition, table 8. */
    @ParameterizedTest
    @CsvSource({
      "12 min, TIME, 720",
      "3 h, TIME, 10800",
      "0.1 ms, TIME, 0.0001",
      "256 ps, TIME, 256e-12",
      "PT90M, TIME, 5400",
      "P1DT0.5S, TIME, 86400.5",
      "-8.0 mm, LENGTH, -0.008",
      "520 nm, LENGTH, 520e-9",
      "3 Å, LENGTH, 3e-10",
      "1 cm, LENGTH, 0.01",
      "30 kV, VOLTAGE, 30000",
      "2.5 uC, CHARGE, 2.5e-6",
      "6 %, RATIO, 0.06",
      "6%, RATIO, 0.06",
      "20 deg, ANGLE, 20",
      "20°, ANGLE, 20",
      "2.65 g/cm3, DENSITY, 2.65",
      "2650 kg/m³, DENSITY, 2.65",
      "1 mm/s, SPEED, 0.001",
      "10 mm/s2, ACCELERATION, 0.01",
      "10 mm/s^2, ACCELERATION, 0.01",
      "2 MHz, FREQUENCY, 2e6",
      "150 /mm, LINE_DENSITY, 150000",
      "40 GGy, ABSORBED_DOSE, 40e9",
      "+1.5e3 pA, CURRENT, 1.5e-9",
      ".5 nA, CURRENT, 5e-10"
    })
    void convertExactly(String text, Dimension dimension, BigDecimal expected) {
      assertEquals(0, expected.compareTo(QuantityText.value(text, dimension)), text);
    }

    @Test
    void giveTheSameValueHoweverItIsWritten() {
      assertEquals(QuantityText.current("500 pA"), QuantityText.current("0.5 nA"));
      assertEquals(QuantityText.length("0.3 mm"), QuantityText.length("300 um"));
    }

    @Test
    void areAllReadBackByTheirOwnSymbol() {
      assertEquals(
          Dimension.values().length,
          UnitTable.units().stream().map(Unit::dimension).distinct().count());
      for (Unit unit : UnitTable.units()) {
        assertTrue(QuantityText.value("1 " + unit.symbol(), unit.dimension()).signum() > 0);
      }
      for (Dimension dimension : Dimension.values()) {
        assertTrue(QuantityText.value(dimension.example(), dimension).signum() > 0);
      }
    }
  }

  @Nested
  class Fluences {

    /**
     * The project's physics reference, cases 1.2 to 1.4: 1 e/nm² = 0.160217663 C/m² = 16.0217663
     * µC/cm² = 0.01 e/Å²; 1 C/m² = 6.241509 e/nm²; 1 µC/cm² = 0.06241509 e/nm²; 1 e/Å² = 16.02177
     * C/m² = 1602.177 µC/cm². Tolerance: half a unit of the last printed digit.
     */
    @ParameterizedTest
    @CsvSource({
      "0.160217663 C/m2, 1, 5e-9",
      "16.0217663 uC/cm2, 1, 5e-9",
      "0.01 e/Å2, 1, 0",
      "0.01 e/A2, 1, 0",
      "0.01 e/\u212b\u00b2, 1, 0",
      "1 C/m2, 6.241509, 5e-7",
      "1 µC/cm², 0.06241509, 5e-9",
      "16.02177 C/m2, 100, 5e-5",
      "1602.177 uC/cm2, 100, 5e-5",
      "60 e/nm2, 60, 0",
      "60 e/nm^2, 60, 0"
    })
    void convertAsThePhysicsReferenceSays(String text, double expected, double tolerance) {
      double read = QuantityText.fluence(text).electronsPerSquareNanometre();
      assertEquals(expected, read, tolerance + Math.ulp(expected), text);
    }

    /** The elementary charge is 1.602176634e-19 C, exact (SI Brochure, 9th edition). */
    @Test
    void countOneElectronPerElementaryCharge() {
      assertEquals(1.0, QuantityText.fluence("0.1602176634 C/m2").electronsPerSquareNanometre());
    }
  }

  @Nested
  class Refusals {

    @ParameterizedTest
    @CsvSource(
        delimiter = '|',
        value = {
          "10 kV | 10 kV is a voltage, where a current is expected; write a current such as 500 pA",
          "10 kX | kX in 10 kX is no unit of current; write a current such as 500 pA",
          "10 PA | PA in 10 PA is no unit of current; write 10 pA",
          "10 ma | ma in 10 ma is no unit of current; write a current such as 500 pA",
          "10 | 10 has no unit; write a current such as 500 pA",
          "10pA | 10pA has no space before its unit; write 10 pA",
          "1e3pA | 1e3pA has no space before its unit; write 1e3 pA",
          "0,5 nA | 0,5 nA has a decimal comma; write 0.5 nA",
          "fast | fast is no current; write a number, a space and a unit, such as 500 pA",
          "NaN A | NaN A is no current; write a number, a space and a unit, such as 500 pA",
          "inf A | inf A is no current; write a number, a space and a unit, such as 500 pA",
          "1e999 A | 1e999 A is no current; write a number, a space and a unit, such as 500 pA",
          "PT1H | PT1H is no current; write a number, a space and a unit, such as 500 pA",
          "٣ pA | ٣ pA is no current; write a number, a space and a unit, such as 500 pA",
        })
    void sayWhatIsWrongAndWhatToWrite(String text, String message) {
      assertEquals(message, refusal(text, Dimension.CURRENT).getMessage());
    }

    @Test
    void tellAnEmptyText() {
      assertEquals(
          "an empty text is no length; write a number, a space and a unit, such as 400 um",
          refusal("  ", Dimension.LENGTH).getMessage());
    }

    @Test
    void areQuickForAHugeText() {
      String message = refusal("1".repeat(2_000_000) + " pA", Dimension.CURRENT).getMessage();
      assertEquals(
          "1".repeat(QuantityText.LONGEST_CHARACTERS)
              + "… is no current; write a number, a space and a unit, such as 500 pA",
          message);
    }

    @Test
    void keepATimeToWholeNanoseconds() {
      assertEquals(Duration.ofNanos(100), QuantityText.duration("0.1 us"));
      assertEquals(Duration.ofNanos(1), QuantityText.duration("1000 ps"));
      assertEquals(
          "0.25 ns is no whole number of nanoseconds; write a time such as 40 us",
          assertThrows(QuantityFormatException.class, () -> QuantityText.duration("0.25 ns"))
              .getMessage());
    }

    @ParameterizedTest
    @ValueSource(strings = {"9e99 h", "-9e99 s"})
    void keepATimeToWhatCanBeCounted(String text) {
      assertEquals(
          text + " is longer than any time that can be counted; write a time such as 40 us",
          assertThrows(QuantityFormatException.class, () -> QuantityText.duration(text))
              .getMessage());
    }

    @ParameterizedTest
    @ValueSource(strings = {"P1Y", "PT", "PT1X", "P9999999999999999999D"})
    void tellABrokenDuration(String text) {
      assertEquals(
          text
              + " is no ISO 8601 duration of days, hours, minutes and seconds; write a time such as"
              + " PT90M or 90 min",
          refusal(text, Dimension.TIME).getMessage());
    }

    private QuantityFormatException refusal(String text, Dimension dimension) {
      return assertThrows(QuantityFormatException.class, () -> QuantityText.value(text, dimension));
    }
  }
}
