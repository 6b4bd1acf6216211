package beamwarden.dose;

import static org.junit.jupiter.api.Assertions.assertEquals;

import beamwarden.beam.BeamSettings;
import beamwarden.instrument.Probe;
import beamwarden.quantity.Current;
import beamwarden.quantity.Length;
import beamwarden.quantity.Voltage;
import java.util.List;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class ProbeTableTest {
  private static final List<Probe> TABLE =
      List.of(probe(5, 100, 4), probe(5, 1000, 9), probe(20, 100, 2), probe(20, 1000, 6));

  @ParameterizedTest
  @CsvSource({
    "5, 100, 4",
    "20, 1000, 6", // measured
    "5, 300, 9",
    "20, 300, 6",
    "10, 100, 4", // between two lines
    "10, 300, 9", // between four
    "2, 50, 4",
    "30, 5000, 6",
    "30, 300, 6" // beyond the table
  })
  void takesTheLargerNeighbour(double kilovolts, double picoamperes, double nanometres) {
    BeamSettings beam =
        new BeamSettings(new Voltage(kilovolts * 1000), new Current(picoamperes * 1e-12));
    assertEquals(nanometres * 1e-9, ProbeTable.diameterMetres(TABLE, beam), 1e-15);
  }

  @ParameterizedTest
  @CsvSource("10, 300")
  void isZeroWithoutATable(double kilovolts, double picoamperes) {
    BeamSettings beam =
        new BeamSettings(new Voltage(kilovolts * 1000), new Current(picoamperes * 1e-12));
    assertEquals(0, ProbeTable.diameterMetres(List.of(), beam));
  }

  private static Probe probe(double kilovolts, double picoamperes, double nanometres) {
    return new Probe(
        new Voltage(kilovolts * 1000),
        new Current(picoamperes * 1e-12),
        new Length(nanometres * 1e-9));
  }
}
