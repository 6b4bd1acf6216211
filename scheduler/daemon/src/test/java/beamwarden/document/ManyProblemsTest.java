package beamwarden.document;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.document.Problem.Severity;
import beamwarden.queue.Queue;
import java.util.List;
import org.junit.jupiter.api.Test;

class ManyProblemsTest {

  private static final String TWELVE_MISTAKES =
      """
      queue: bad night
      samples:
        - id: lim-02
          lable: limestone
          placement: { x: 30 mm, y: 0 mm, uncertainty: 3 um }
          caps:
            - { fluence: 900 e/nm2 }
            - { charge: 12 kV }
      jobs:
        - id: survey
          sample: lim-20
          mode: intensity-map
          voltage: 80 kV
          dwell: 25 us
          dwell: 30 us
          region: { centre: [0 um, 0 um], size: [900 um, 300 um] }
          pixels: [1000, 1000]
          filters: [ultraviolet]
        - id: spots
          sample: lim-02
          mode: photon-correlation
          voltage: 5 kV
          current: 15 pA
          region: { points: [[0 um, 0 um]] }
          until: { at-most: 0.1 s }
          after: [survay]
      """;

  @Test
  void areAllToldAtOnceInTheOrderOfTheirPlaces() {
    Reading<Queue> reading = Samples.queue(TWELVE_MISTAKES);
    assertEquals(
        List.of(
            "1:8: error: \"bad night\" cannot stand in a path or an address; write at most 64"
                + " letters a-z, digits, - _ and . that begin with a letter or digit, such as"
                + " first-night",
            "4:5: error: lable is no key of a sample; did you mean label?",
            "7:9: error: this cap averages over the generation range, and the sample's material is"
                + " not given; write the sample's material, or a length such as over: 200 nm",
            "8:19: error: charge: 12 kV is a voltage, where a charge is expected; write a charge"
                + " such as 40 uC",
            "10:5: error: a job needs current; write for example current: 350 pA",
            "11:13: error: this queue has no sample lim-20; did you mean lim-02?",
            "13:14: error: voltage is 80 kV, above the 30 kV that north-room allows; write 1 kV to"
                + " 30 kV",
            "15:5: error: dwell is given twice, first in line 14; keep one of the two",
            "16:44: error: size is 900 um, more than the field of intensity-map on north-room,"
                + " 300 um; write at most 300 um, or a mosaic of smaller tiles",
            "18:15: error: north-room has no filter ultraviolet; write red, violet or panchromatic",
            "24:24: error: this point lies at [30 mm, 0 m] of the stage, and the stage of"
                + " north-room reaches from [-25 mm, -20 mm] to [25 mm, 20 mm]; move the region,"
                + " or correct the sample's placement",
            "25:23: error: at-most is 0.1 s, below the 1 s that photon-correlation on north-room"
                + " allows; write 1 s to 744 h",
            "26:13: error: after names survay, and this queue has no such job; did you mean"
                + " survey?"),
        Samples.problems(reading));
    assertTrue(reading.value().isEmpty());
  }

  @Test
  void eachKnowItsFileItsPathAndItsSeverity() {
    Problem first = Samples.queue(TWELVE_MISTAKES).problems().get(6);
    assertEquals(
        new Problem(
            Severity.ERROR,
            "queue.yaml",
            13,
            14,
            "jobs[0].voltage",
            "voltage is 80 kV, above the 30 kV that north-room allows",
            "write 1 kV to 30 kV"),
        first);
  }

  @Test
  void pathsLeadThroughListsAndGroups() {
    assertEquals(
        List.of(
            "queue",
            "samples[0].lable",
            "samples[0].caps[0]",
            "samples[0].caps[1].charge",
            "jobs[0]",
            "jobs[0].sample",
            "jobs[0].voltage",
            "jobs[0].dwell",
            "jobs[0].region.size[0]",
            "jobs[0].filters[0]",
            "jobs[1].region.points[0]",
            "jobs[1].until.at-most",
            "jobs[1].after[0]"),
        Samples.queue(TWELVE_MISTAKES).problems().stream().map(Problem::path).toList());
  }

  @Test
  void areCountedWhenThereAreTooManyToList() {
    String text = Samples.QUEUE + "    x: 1\n".repeat(3) + many(400);
    List<Problem> problems = Samples.queue(text).problems();
    assertEquals(Limits.PROBLEMS + 1, problems.size());
    assertEquals(
        "there are 203 more problems; mend those above first",
        problems.get(Limits.PROBLEMS).message() + "; " + problems.get(Limits.PROBLEMS).advice());
  }

  @Test
  void forbidAQueueEvenWhenItsListIsFullOfWarnings() {
    String warnings = "electron-image, ".repeat(Limits.PROBLEMS + 10);
    String text =
        Samples.QUEUE
            .replace("filters: [violet, red]", "also: [" + warnings + "electron-image]")
            .replace("at-cap: ask", "at-cap: asks");
    Reading<Queue> reading = Samples.queue(text);
    assertTrue(reading.value().isEmpty());
    assertEquals(Severity.ERROR, reading.problems().get(Limits.PROBLEMS).severity());
  }

  private static String many(int count) {
    StringBuilder keys = new StringBuilder();
    for (int index = 0; index < count; index++) {
      keys.append("    unknown-").append(index).append(": 1\n");
    }
    return keys.toString();
  }
}
