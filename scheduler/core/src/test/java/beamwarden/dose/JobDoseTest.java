package beamwarden.dose;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.Mosaic;
import beamwarden.instrument.Abilities;
import beamwarden.quantity.Current;
import beamwarden.queue.Averaging;
import beamwarden.queue.Cap;
import beamwarden.queue.Job;
import beamwarden.queue.Sample;
import java.time.Duration;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;

class JobDoseTest {
  private static final SampleDose NOTHING = SampleDose.nothing(Fixtures.PLACED);
  private static final Duration DWELL = Duration.ofNanos(40_000);
  private static final Abilities EXACT = Fixtures.exact();

  /** 1 nA, 40 us, 200 nm: 6.2415 e/nm2 a pass, 1.6 nC of 100 by 400 pixels. */
  private static final Job FOUR_FRAMES =
      Fixtures.map(Fixtures.square(0, 0, 20, 80), 100, 400, DWELL, 4, "green", "red");

  @Nested
  class WhatAJobGives {
    @Test
    void isItsChargeItsMeanAndItsHighest() {
      JobDose dose = of(FOUR_FRAMES, Fixtures.quartz(Fixtures.overGeneration(1000)), EXACT);
      assertEquals(8 * 1.6e-9, dose.best().coulombs(), 1e-18);
      assertEquals(8 * 1.6e-9, dose.upper().coulombs(), 1e-18);
      assertEquals(8 * 6.241509, dose.mean().electronsPerSquareNanometre(), 1e-4);
      assertEquals(
          8 * 6.241509, dose.highest().orElseThrow().fluence().electronsPerSquareNanometre(), 1e-4);
      assertEquals(new CapVerdict.Admitted(), dose.verdict());
    }

    @Test
    void isMoreWhereTilesOverlap() {
      Mosaic mosaic = new Mosaic(2, 2, 20e-6, 20e-6, 0.1, Fixtures.point(0, 0), 0);
      Job job = Fixtures.map(mosaic, 100, 100, DWELL, 1, "green");
      JobDose dose = of(job, Fixtures.quartz(), EXACT);
      assertEquals(6.241509, dose.mean().electronsPerSquareNanometre(), 1e-4);
      LocalFluence highest = dose.highest().orElseThrow();
      assertEquals(4 * 6.241509, highest.fluence().electronsPerSquareNanometre(), 1e-4);
      assertEquals(0, highest.at().distanceMetres(Fixtures.point(0, 0)), 1e-9);
    }

    @Test
    void isSaidInTheAveragingOfTheFirstFluenceCap() {
      Sample hard =
          Fixtures.quartz(Fixtures.charge(1), Fixtures.fluence(1e9, new Averaging.OverProbe()));
      double highest =
          of(FOUR_FRAMES, hard, EXACT)
              .highest()
              .orElseThrow()
              .fluence()
              .electronsPerSquareNanometre();
      assertTrue(highest > 1000 * 6.241509);
    }

    @Test
    void isNotSaidWhereTheAveragingIsNotKnown() {
      Sample unknown =
          new Sample("sst-07", "?", Optional.empty(), Fixtures.PLACED, List.of(), List.of());
      JobDose dose = of(FOUR_FRAMES, unknown, EXACT);
      assertEquals(Optional.empty(), dose.highest());
      assertEquals(8 * 1.6e-9, dose.best().coulombs(), 1e-18);
    }

    @Test
    void hasUpperValuesAboveItsBestOnes() {
      JobDose dose = of(FOUR_FRAMES, Fixtures.quartz(), Fixtures.usual());
      double best = dose.highest().orElseThrow().fluence().electronsPerSquareNanometre();
      double upper = dose.highestUpper().orElseThrow().fluence().electronsPerSquareNanometre();
      assertEquals((1.03 + 0.0002) * 1.1 / (0.98 * 0.98), upper / best, 1e-4);
    }
  }

  @Nested
  class ATrim {
    @Test
    void keepsAsManyFramesAsFit() {
      assertTrim(new Trim(400, 6), FOUR_FRAMES, Fixtures.overGeneration(40));
      assertTrim(new Trim(400, 2), FOUR_FRAMES, Fixtures.overGeneration(20));
    }

    @Test
    void keepsTheWholeJobWhereItFits() {
      assertTrim(new Trim(400, 8), FOUR_FRAMES, Fixtures.overGeneration(50));
    }

    @Test
    void keepsTheSameLinesOfEveryFilterWhereNoFrameFits() {
      // 2 filters of 4 pC a line: 250 lines make 2 nC.
      assertTrim(new Trim(250, 2), FOUR_FRAMES, Fixtures.charge(2.0001e-9));
      assertTrim(new Trim(249, 2), FOUR_FRAMES, Fixtures.charge(1.9999e-9));
    }

    @Test
    void isShorterAtEveryPoint() {
      Job job = Fixtures.count(Duration.ofSeconds(90), Fixtures.point(0, 0), Fixtures.point(50, 0));
      Trim trim = trim(job, Fixtures.quartz(Fixtures.charge(100e-9)), NOTHING, Done.NOTHING);
      assertEquals(2, trim.passes());
      assertEquals(50e9, (double) trim.unitsPerPass(), 2);
    }

    @Test
    void isEmptyWhenNotEvenALineFits() {
      assertEquals(
          Optional.empty(),
          JobDose.trim(
              FOUR_FRAMES,
              Fixtures.quartz(Fixtures.overGeneration(6)),
              NOTHING,
              EXACT,
              Fixtures.ONE_NANOAMPERE,
              Done.NOTHING));
    }

    @Test
    void countsWhatIsBookedOfTheJobItself() {
      Done done = Done.NOTHING.plus(0, 400).plus(1, 400).plus(2, 400);
      SampleDose booked =
          NOTHING.plus(
              Deliveries.whole(
                      FOUR_FRAMES,
                      Fixtures.quartz(),
                      EXACT,
                      Fixtures.ONE_NANOAMPERE,
                      Done.NOTHING,
                      Optional.empty())
                  .subList(0, 3)
                  .stream()
                  .map(JobDoseTest::booked)
                  .toList());
      Sample sample = Fixtures.quartz(Fixtures.overGeneration(40));
      assertEquals(new Trim(400, 6), trim(FOUR_FRAMES, sample, booked, done));
    }

    @Test
    void isJudgedAtTheCurrentThatWasRead() {
      Sample sample = Fixtures.quartz(Fixtures.charge(8 * 1.6e-9 * 1.2));
      assertEquals(
          Optional.of(new Trim(400, 6)),
          JobDose.trim(
              FOUR_FRAMES, sample, NOTHING, Fixtures.usual(), new Current(1.1e-9), Done.NOTHING));
    }
  }

  private static Delivery booked(Delivery planned) {
    return Deliveries.planned(
        planned.exposure(), EXACT, planned.bestCurrent(), -planned.grant(), 3);
  }

  private static void assertTrim(Trim expected, Job job, Cap cap) {
    Sample sample = Fixtures.quartz(cap);
    assertEquals(expected, trim(job, sample, NOTHING, Done.NOTHING));
    List<Delivery> kept =
        Deliveries.whole(
            job, sample, EXACT, Fixtures.ONE_NANOAMPERE, Done.NOTHING, Optional.of(expected));
    assertInstanceOf(CapVerdict.Admitted.class, Caps.admit(sample, NOTHING, kept));
  }

  private static Trim trim(Job job, Sample sample, SampleDose dose, Done done) {
    return JobDose.trim(job, sample, dose, EXACT, Fixtures.ONE_NANOAMPERE, done).orElseThrow();
  }

  private static JobDose of(Job job, Sample sample, Abilities abilities) {
    return JobDose.of(job, sample, abilities, NOTHING, Done.NOTHING, Optional.empty());
  }
}
