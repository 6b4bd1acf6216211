package beamwarden.dose;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;

import beamwarden.queue.Job;
import beamwarden.queue.Sample;
import java.time.Duration;
import java.util.Optional;
import org.junit.jupiter.api.Test;

class CapsTest {
  @Test
  void refusesAnExposureThatWouldPassTheCap() {
    // physics #2.1: 1 nA, 40 us, 10 nm: 2496.604 e/nm2.
    Job job =
        Fixtures.map(
            Fixtures.square(0, 0, 10, 10), 1000, 1000, Duration.ofNanos(40_000), 1, "green");
    Sample sample = Fixtures.quartz(Fixtures.overGeneration(2496.6));
    JobDose dose =
        JobDose.of(
            job,
            sample,
            Fixtures.exact(),
            SampleDose.nothing(Fixtures.PLACED),
            Done.NOTHING,
            Optional.empty());
    assertEquals(2496.604, dose.mean().electronsPerSquareNanometre(), 0.0005);
    assertEquals(
        2496.604, dose.highest().orElseThrow().fluence().electronsPerSquareNanometre(), 0.0005);
    var refused = assertInstanceOf(CapVerdict.Refused.class, dose.verdict());
    assertEquals(
        "job survey would bring the local fluence at [0 m, 0 m] to 2496.604 e/nm2 (0 e/nm2 booked,"
            + " 2496.604 e/nm2 asked; upper values), above the cap of 2496.6 e/nm2; ask for less dwell,"
            + " current or passes, or have more approved",
        refused.because());
  }
}
