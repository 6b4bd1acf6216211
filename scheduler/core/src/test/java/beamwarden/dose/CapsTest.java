package beamwarden.dose;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.Rectangle;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import beamwarden.quantity.Charge;
import beamwarden.quantity.Length;
import beamwarden.queue.Area;
import beamwarden.queue.Averaging;
import beamwarden.queue.Cap;
import beamwarden.queue.Job;
import beamwarden.queue.Sample;
import java.time.Duration;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;

class CapsTest {
  private static final SampleDose NOTHING = SampleDose.nothing(Fixtures.PLACED);
  private static final Duration DWELL = Duration.ofNanos(40_000);

  /** physics #2.1: 1 nA, 40 us, 10 nm give 2496.604 e/nm2. */
  private static final double ONE_PASS = 2496.604;

  /** Half the Kanaya-Okayama range of quartz at 10 kV, physics #4.1: 1.268 um times 0.9948. */
  private static final double HALF_RANGE_UM = 1.268 * 0.9948 / 2;

  private static final double PROBE_TAIL_UM = 8 * 0.00424661;

  @Nested
  class AFluenceCap {
    @Test
    void refusesAnExposureThatWouldPassIt() {
      CapVerdict.Refused refused =
          refused(Fixtures.quartz(Fixtures.overGeneration(2496.6)), NOTHING, map(0, 0));
      assertEquals(
          "job survey would bring the local fluence at [0 m, 0 m] to 2496.604 e/nm2 (0 e/nm2"
              + " booked, 2496.604 e/nm2 asked; upper values), above the cap of 2496.6 e/nm2; ask"
              + " for less dwell, current or passes, or have more approved",
          refused.because());
    }

    @Test
    void admitsWhatReachesItExactlyAndNothingMore() {
      double exactly = upper(map(0, 0));
      assertAdmitted(Fixtures.quartz(Fixtures.overGeneration(exactly)), NOTHING, map(0, 0));
      refused(Fixtures.quartz(Fixtures.overGeneration(Math.nextDown(exactly))), NOTHING, map(0, 0));
    }

    @Test
    void countsWhatIsBooked() {
      SampleDose booked = NOTHING.plus(numbered(planned(map(0, 0)), 100));
      CapVerdict.Refused refused =
          refused(Fixtures.quartz(Fixtures.overGeneration(4000)), booked, map(5, 0));
      assertEquals(ONE_PASS, refused.booked(), 0.001);
      assertEquals(ONE_PASS, refused.asked(), 0.001);
      assertEquals(2.5e-6, refused.at().orElseThrow().xMetres(), 2.5e-6);
    }

    @Test
    void doesNotMindWhatIsBookedElsewhere() {
      SampleDose booked = NOTHING.plus(numbered(planned(map(0, 0)), 100));
      assertAdmitted(Fixtures.quartz(Fixtures.overGeneration(2500)), booked, map(10, 0));
      refused(Fixtures.quartz(Fixtures.overGeneration(2500)), booked, map(9.99, 0));
    }

    @Test
    void judgesACoarseMapOnItsMeanOverGenerationAndOnItsHotSpotsOverTheProbe() {
      // Pitch 100 nm, probe 10 nm: isolated spots, N/(2 pi sigma^2).
      Job coarse = Fixtures.map(Fixtures.square(0, 0, 10, 10), 100, 100, DWELL, 1, "green");
      assertAdmitted(Fixtures.quartz(Fixtures.overGeneration(25)), NOTHING, coarse);
      CapVerdict.Refused refused =
          refused(
              Fixtures.quartz(Fixtures.fluence(25, new Averaging.OverProbe())), NOTHING, coarse);
      assertEquals(249660.36 / (2 * Math.PI * 4.246609 * 4.246609), refused.asked(), 0.1);
      Averaging width = new Averaging.OverLength(new Length(200e-9));
      assertAdmitted(Fixtures.quartz(Fixtures.fluence(25, width)), NOTHING, coarse);
    }

    @Test
    void overGenerationIsRefusedWithoutAMaterial() {
      Sample unknown =
          new Sample(
              "sst-07",
              "?",
              Optional.empty(),
              Fixtures.PLACED,
              List.of(),
              List.of(Fixtures.overGeneration(1e9)));
      assertEquals(
          "job survey is refused by the cap of 1000000000 e/nm2: it averages over the generation"
              + " range, and the sample's material is not known; state the material, or a length"
              + " to average over",
          refused(unknown, NOTHING, map(0, 0)).because());
    }

    @Test
    void overTheProbeIsRefusedWithoutAMeasuredProbe() {
      Sample sample = Fixtures.quartz(Fixtures.fluence(1e9, new Averaging.OverProbe()));
      List<Delivery> asked = planned(map(0, 0), Fixtures.withProbes(Fixtures.exact(), List.of()));
      assertEquals(
          "job survey is refused by the cap of 1000000000 e/nm2: it averages over the probe, and"
              + " the instrument profile has no measured probe; add one, or state a length to"
              + " average over",
          assertInstanceOf(CapVerdict.Refused.class, Caps.admit(sample, NOTHING, asked)).because());
    }

    @Test
    void neverCountsTooLittleOfWhatIsTurnedOtherwise() {
      Rectangle turned = new Rectangle(Fixtures.point(8, 8), 10e-6, 10e-6, 45);
      List<Delivery> booked =
          numbered(planned(Fixtures.map(turned, 1000, 1000, DWELL, 1, "green")), 100);
      // Only the boxes around them overlap; counting both is safe, and is what is promised.
      refused(Fixtures.quartz(Fixtures.overGeneration(4000)), NOTHING.plus(booked), map(0, 0));
      assertAdmitted(
          Fixtures.quartz(Fixtures.overGeneration(5000)), NOTHING.plus(booked), map(0, 0));
    }

    @Test
    void holdsAlongTheAxesOfEveryPassThatIsTouched() {
      // Along its own axes the asked square is clear of the turned one's box; along those of the
      // turned one, its own box reaches in.
      SampleDose booked = NOTHING.plus(numbered(planned(turned()), 100));
      Sample sample = Fixtures.quartz(Fixtures.overGeneration(1.5 * ONE_PASS));
      refused(sample, booked, map(15, 0));
      Sample wide = Fixtures.quartz(Fixtures.overGeneration(2.5 * ONE_PASS));
      assertAdmitted(wide, booked, map(15, 0));
      SampleDose both = booked.plus(numbered(planned(map(15, 0)), 200));
      for (Standing standing : Caps.standing(wide, both)) {
        assertTrue(standing.upper() <= standing.limit(), standing::toString);
      }
    }

    @Test
    void doesNotMindATurnedPassThatTouchedNothing() {
      Delivery nothing = touchingNothing(numbered(planned(turned()), 100).get(0));
      assertAdmitted(
          Fixtures.quartz(Fixtures.overGeneration(2500)), NOTHING.plus(nothing), map(15, 0));
    }

    private Job turned() {
      Rectangle outline = Fixtures.square(0, 0, 10, 10);
      Rectangle diamond = new Rectangle(outline.centre(), 10e-6, 10e-6, 45);
      return Fixtures.map(diamond, 1000, 1000, DWELL, 1, "green");
    }

    private Delivery touchingNothing(Delivery delivery) {
      return new Delivery(
          delivery.grant(),
          delivery.stay(),
          delivery.exposure(),
          0,
          Duration.ZERO,
          Duration.ZERO,
          delivery.bestCurrent(),
          delivery.upperCurrent(),
          delivery.tolerances());
    }
  }

  @Nested
  class ACapOnAnArea {
    private final Area area = new Area("grain", Fixtures.square(100, 0, 20, 20), Area.Use.CAPPED);

    @Test
    void holdsInsideItOnly() {
      Sample sample = sample(0, area, Fixtures.fluenceIn("grain", 8));
      assertAdmitted(sample, NOTHING, map(85, 0));
      assertEquals(8, refused(sample, NOTHING, map(85.01, 0)).limit());
    }

    @Test
    void isWiderByThePlacementsUncertainty() {
      Sample sample = sample(3, area, Fixtures.fluenceIn("grain", 8));
      assertAdmitted(sample, NOTHING, map(81.9, 0));
      refused(sample, NOTHING, map(82.1, 0));
    }

    @Test
    void countsChargeInFullOnceTheFootprintTouchesIt() {
      Cap cap = new Cap.OnCharge(new Charge(30e-9), Optional.of("grain"), "");
      Sample sample = sample(0, area, cap);
      assertAdmitted(sample, NOTHING, map(84, 0));
      CapVerdict.Refused refused = refused(sample, NOTHING, map(86, 0));
      assertEquals(40e-9, refused.asked(), 1e-15);
      assertEquals(
          "job survey would bring the charge to 0.04 uC (0 uC booked, 0.04 uC asked; upper"
              + " values), above the cap of 0.03 uC on the area grain; ask for less dwell, current"
              + " or passes, or have more approved",
          refused.because());
    }
  }

  @Nested
  class ACapOnCharge {
    @Test
    void countsAllThatTheSampleReceives() {
      SampleDose booked = NOTHING.plus(numbered(planned(map(0, 0)), 100));
      assertAdmitted(Fixtures.quartz(Fixtures.charge(80.001e-9)), booked, map(400, 0));
      CapVerdict.Refused refused =
          refused(Fixtures.quartz(Fixtures.charge(79.999e-9)), booked, map(400, 0));
      assertEquals(40e-9, refused.booked(), 1e-15);
      assertEquals(Optional.empty(), refused.at());
    }
  }

  @Nested
  class AKeepOutArea {
    private final Area area =
        new Area("for-later", Fixtures.square(100, 0, 20, 20), Area.Use.KEEP_OUT);

    @Test
    void mayNotBeReachedByTheSpreadOfElectrons() {
      double nearest = 90 - 5 - HALF_RANGE_UM - PROBE_TAIL_UM;
      assertAdmitted(sample(0, area), NOTHING, map(nearest - 0.01, 0));
      assertEquals(
          "job survey would reach the keep-out area for-later, position uncertainty and the"
              + " spread of electrons counted in",
          refused(sample(0, area), NOTHING, map(nearest + 0.01, 0)).because());
    }

    @Test
    void isWiderByThePlacementsUncertainty() {
      double nearest = 90 - 5 - HALF_RANGE_UM - PROBE_TAIL_UM - 3;
      assertAdmitted(sample(3, area), NOTHING, map(nearest - 0.01, 0));
      refused(sample(3, area), NOTHING, map(nearest + 0.01, 0));
    }

    @Test
    void mayNotBeReachedByTheTailOfAPoint() {
      double sigma = 2 * HALF_RANGE_UM / 2.354820045;
      double nearest = 90 - 8 * sigma - HALF_RANGE_UM - PROBE_TAIL_UM;
      assertAdmitted(sample(0, area), NOTHING, rest(nearest - 0.02, 1));
      refused(sample(0, area), NOTHING, rest(nearest + 0.02, 1));
    }

    @Test
    void forbidsEverythingWhenTheMaterialIsNotKnown() {
      Sample unknown =
          new Sample("sst-07", "?", Optional.empty(), Fixtures.PLACED, List.of(area), List.of());
      assertEquals(
          "job survey would reach the keep-out area for-later; how far electrons spread is not"
              + " known without the sample's material",
          refused(unknown, NOTHING, map(-300, 0)).because());
    }

    @Test
    void isReachedByTheCornerOfATurnedMap() {
      Rectangle turned = new Rectangle(Fixtures.point(84, 0), 10e-6, 10e-6, 45);
      refused(sample(0, area), NOTHING, Fixtures.map(turned, 1000, 1000, DWELL, 1, "green"));
    }
  }

  @Nested
  class ASacrificialArea {
    private final Area area =
        new Area("spots", Fixtures.square(100, 0, 30, 30), Area.Use.SACRIFICIAL);
    private final Cap ownCap = new Cap.OnCharge(new Charge(100e-9), Optional.of("spots"), "");

    @Test
    void isExemptFromTheSamplesFluenceCaps() {
      assertAdmitted(sample(0, area, Fixtures.overGeneration(10), ownCap), NOTHING, map(100, 0));
    }

    @Test
    void keepsItsOwnChargeCap() {
      SampleDose booked =
          NOTHING
              .plus(numbered(planned(map(100, 0)), 100))
              .plus(numbered(planned(map(100, 0)), 200));
      CapVerdict.Refused refused =
          refused(sample(0, area, Fixtures.overGeneration(10), ownCap), booked, map(100, 0));
      assertEquals(ownCap, refused.cap());
      assertEquals(80e-9, refused.booked(), 1e-15);
    }

    @Test
    void isSpentGroundForWhatIsNotWhollyInsideIt() {
      Sample sample = sample(0, area, Fixtures.overGeneration(1e9), ownCap);
      assertEquals(
          "job survey would reach the spent ground of the area spots, position uncertainty and the"
              + " spread of electrons counted in",
          refused(sample, NOTHING, map(85, 0)).because());
      double nearest = 85 - 5 - 2 * HALF_RANGE_UM;
      assertAdmitted(sample, NOTHING, map(nearest - 0.01, 0));
      refused(sample, NOTHING, map(nearest + 0.01, 0));
    }

    @Test
    void holdsAnExposureOnlyWhenUncertaintyLeavesItInside() {
      Sample sample = sample(3, area, Fixtures.overGeneration(1e9), ownCap);
      assertAdmitted(sample, NOTHING, map(106.9, 0));
      refused(sample, NOTHING, map(107.1, 0));
    }

    @Test
    void doesNotExcuseTailsBeyondItsBorder() {
      // 1 nA for 90 s: some 5.6e11 electrons, 3e5 e/nm2 in the middle, 6e3 at two sigma.
      Cap wide = new Cap.OnCharge(new Charge(1e-6), Optional.of("spots"), "");
      Sample sample = sample(0, area, Fixtures.overGeneration(100), wide);
      assertAdmitted(sample, NOTHING, rest(100, 90));
      CapVerdict.Refused refused = refused(sample, NOTHING, rest(114, 90));
      assertTrue(refused.at().orElseThrow().xMetres() > 115e-6);
    }

    @Test
    void doesNotMindAnExposureThatTouchedNothing() {
      Sample sample = sample(0, area, Fixtures.overGeneration(1e9), ownCap);
      Delivery planned = numbered(planned(map(100, 0), sample), 100).get(0);
      Delivery unused =
          new Delivery(
              planned.grant(),
              planned.stay(),
              planned.exposure(),
              0,
              Duration.ZERO,
              Duration.ZERO,
              planned.bestCurrent(),
              planned.upperCurrent(),
              planned.tolerances());
      SampleDose dose = SampleDose.nothing(sample.placement()).plus(unused);
      assertAdmitted(sample, dose, map(100, 0));
      assertEquals(0, Caps.standing(sample, dose).get(0).upper());
    }

    @Test
    void isExemptForAMapTurnedOtherwiseThatLiesInside() {
      Rectangle turned = new Rectangle(Fixtures.point(100, 0), 10e-6, 10e-6, 30);
      assertAdmitted(
          sample(0, area, Fixtures.overGeneration(10), ownCap),
          NOTHING,
          Fixtures.map(turned, 1000, 1000, DWELL, 1, "green"));
    }
  }

  @Nested
  class TheStanding {
    @Test
    void saysWhatIsBookedAndWhatIsLeft() {
      Sample sample = Fixtures.quartz(Fixtures.overGeneration(9000), Fixtures.charge(100e-9));
      Abilities drifting = Fixtures.instrument(0, 0, 0.1, Blanker.Kind.FAST, Duration.ZERO);
      SampleDose dose = NOTHING.plus(planned(map(30, 0), drifting));
      List<Standing> standing = Caps.standing(sample, dose);
      assertEquals(2, standing.size());
      assertEquals(ONE_PASS, standing.get(0).best(), 0.001);
      double upper = ONE_PASS * (1.03 + 0.0002) * 1.1;
      assertEquals(upper, standing.get(0).upper(), 0.001);
      assertEquals(9000 - upper, standing.get(0).left(), 0.001);
      assertEquals(30e-6, standing.get(0).at().orElseThrow().xMetres(), 5e-6);
      assertEquals(40e-9, standing.get(1).best(), 1e-15);
      assertEquals("C", standing.get(1).unit());
      assertEquals(100e-9 - 40e-9 * 1.0302 * 1.1, standing.get(1).left(), 1e-15);
    }

    @Test
    void leavesOutSacrificialGround() {
      Area area = new Area("spots", Fixtures.square(100, 0, 30, 30), Area.Use.SACRIFICIAL);
      Sample sample = sample(0, area, Fixtures.overGeneration(9000));
      SampleDose dose = NOTHING.plus(planned(map(100, 0)));
      assertEquals(0, Caps.standing(sample, dose).get(0).upper());
    }

    @Test
    void isZeroBeforeAnything() {
      Standing standing =
          Caps.standing(Fixtures.quartz(Fixtures.overGeneration(9000)), NOTHING).get(0);
      assertEquals(0, standing.upper());
      assertEquals(9000, standing.left());
      assertEquals(Optional.empty(), standing.at());
    }
  }

  private static void assertAdmitted(Sample sample, SampleDose dose, Job job) {
    assertEquals(
        new CapVerdict.Admitted(),
        Caps.admit(sample, dose.at(sample.placement()), planned(job, sample)));
  }

  private static CapVerdict.Refused refused(Sample sample, SampleDose dose, Job job) {
    return assertInstanceOf(
        CapVerdict.Refused.class,
        Caps.admit(sample, dose.at(sample.placement()), planned(job, sample)));
  }

  private static double upper(Job job) {
    return JobDose.of(
            job, Fixtures.quartz(), Fixtures.exact(), NOTHING, Done.NOTHING, Optional.empty())
        .highestUpper()
        .orElseThrow()
        .fluence()
        .electronsPerSquareNanometre();
  }

  private static List<Delivery> planned(Job job) {
    return planned(job, Fixtures.exact());
  }

  private static List<Delivery> planned(Job job, Sample sample) {
    return Deliveries.whole(
        job, sample, Fixtures.exact(), job.beam().current(), Done.NOTHING, Optional.empty());
  }

  private static List<Delivery> planned(Job job, Abilities abilities) {
    return Deliveries.whole(
        job, Fixtures.quartz(), abilities, job.beam().current(), Done.NOTHING, Optional.empty());
  }

  private static List<Delivery> numbered(List<Delivery> deliveries, long from) {
    return deliveries.stream()
        .map(
            delivery ->
                new Delivery(
                    from - delivery.grant(),
                    from,
                    delivery.exposure(),
                    delivery.unitsTouched(),
                    delivery.bestBeamOn(),
                    delivery.upperBeamOn(),
                    delivery.bestCurrent(),
                    delivery.upperCurrent(),
                    delivery.tolerances()))
        .toList();
  }

  /** 10 um by 10 um in pixels of 10 nm about a place in micrometres. */
  private static Job map(double x, double y) {
    return Fixtures.map(Fixtures.square(x, y, 10, 10), 1000, 1000, DWELL, 1, "green");
  }

  private static Job rest(double x, int seconds) {
    return Fixtures.count(Duration.ofSeconds(seconds), Fixtures.point(x, 0));
  }

  private static Sample sample(double uncertaintyMicrometres, Area area, Cap... caps) {
    Placement placement = new Placement(new Point(0, 0), 0, uncertaintyMicrometres * Fixtures.UM);
    return Fixtures.quartz(placement, List.of(area), caps);
  }
}
