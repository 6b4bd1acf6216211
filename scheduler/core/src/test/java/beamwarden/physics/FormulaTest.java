package beamwarden.physics;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.util.Map;
import java.util.stream.Collectors;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class FormulaTest {
  @Test
  void readsElementsAndCounts() {
    Map<String, Double> parts = parts("SiO2");
    assertEquals(28.085 / (28.085 + 2 * 15.999), parts.get("Si"), 1e-12);
    assertEquals(2 * 15.999 / (28.085 + 2 * 15.999), parts.get("O"), 1e-12);
  }

  @ParameterizedTest
  @CsvSource({
    "Ca(OH)2, CaO2H2",
    "Al0.3Ga0.7As, Al3Ga7As10",
    "K[Al(SO4)2](H2O)12, KAlS2O20H24",
    "((Si)O2)1, SiO2",
    "C6H12O6, CH2O",
    "CdTe, TeCd"
  })
  void readsTheSameMaterialWrittenInAnotherWay(String one, String other) {
    Map<String, Double> expected = parts(other);
    Map<String, Double> parts = parts(one);
    assertEquals(expected.keySet(), parts.keySet());
    parts.forEach((symbol, part) -> assertEquals(expected.get(symbol), part, 1e-12, symbol));
  }

  @Test
  void massPartsAddUpToOne() {
    assertEquals(1, parts("Y3Al5O12").values().stream().mapToDouble(part -> part).sum(), 1e-12);
  }

  @ParameterizedTest
  @CsvSource(
      delimiter = '|',
      value = {
        "''|formula '', character 1: an element was expected",
        "Si O2|formula 'Si O2', character 3: an element was expected",
        "sio2|formula 'sio2', character 1: an element was expected",
        "SiO-2|formula 'SiO-2', character 4: an element was expected",
        "SiX2|formula 'SiX2', character 3: no element X with a standard atomic weight is known",
        "TcO2|formula 'TcO2', character 1: no element Tc with a standard atomic weight is known",
        "Ca(OH2|formula 'Ca(OH2', character 3: this bracket is never closed",
        "Ca(OH]2|formula 'Ca(OH]2', character 6: an element or ')' was expected",
        "CaOH)2|formula 'CaOH)2', character 5: nothing was opened that could close",
        "Ca()2|formula 'Ca()2', character 4: an element was expected",
        "SiO0|formula 'SiO0', character 4: a count above zero was expected, not 0",
        "SiO2.|formula 'SiO2.', character 4: a count above zero was expected, not 2.",
        "2SiO2|formula '2SiO2', character 1: an element was expected"
      })
  void saysWhereAndWhyAFormulaCannotBeRead(String text, String message) {
    assertEquals(
        message,
        assertThrows(IllegalArgumentException.class, () -> Formula.parse(text)).getMessage());
  }

  @Test
  void knowsEveryElementWithAWeightUpToUranium() {
    assertEquals(92 - 2 - 6, Element.count());
    assertEquals(83, Element.of("Bi").orElseThrow().number());
    assertEquals(238.03, Element.of("U").orElseThrow().weight());
  }

  private static Map<String, Double> parts(String formula) {
    return Formula.parse(formula).massParts().entrySet().stream()
        .collect(Collectors.toMap(part -> part.getKey().symbol(), Map.Entry::getValue));
  }
}
