package beamwarden.dose;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;
import static org.junit.jupiter.api.Assertions.assertThrows;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Exposure;
import beamwarden.beam.Mosaic;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.Blanker;
import beamwarden.instrument.CurrentReading;
import beamwarden.instrument.Receipt;
import beamwarden.quantity.Current;
import beamwarden.quantity.Voltage;
import beamwarden.queue.Job;
import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;

class DeliveriesTest {
  private static final Duration BLANKING = Duration.ofNanos(100_000);
  private static final Abilities INSTRUMENT = Fixtures.usual();

  /** 10 lines of 100 pixels of 40 us: 4 ms a line, 40 ms in all. */
  private static final Exposure TEN_LINES =
      Fixtures.exposure(0, Fixtures.lines(Fixtures.square(0, 0, 20, 20), 100, 100, 30, 10));

  private static final Delivery GRANTED =
      Deliveries.planned(TEN_LINES, INSTRUMENT, Fixtures.ONE_NANOAMPERE, 5, 2);

  @Nested
  class AGrant {
    @Test
    void countsTheHighestCurrentAndTheTimeToBlank() {
      assertEquals((1.03e-9 + 2e-13) * 1.1, GRANTED.upperCurrent().amperes(), 1e-21);
      assertEquals(Fixtures.ONE_NANOAMPERE, GRANTED.bestCurrent());
      assertEquals(Duration.ofMillis(40), GRANTED.bestBeamOn());
      assertEquals(Duration.ofMillis(40).plus(BLANKING), GRANTED.upperBeamOn());
      assertEquals(10, GRANTED.unitsTouched());
    }

    @Test
    void countsAReadingAboveTheWish() {
      Delivery delivery = Deliveries.planned(TEN_LINES, INSTRUMENT, new Current(1.05e-9), 5, 2);
      assertEquals((1.05e-9 * 1.03 + 2e-13) * 1.1, delivery.upperCurrent().amperes(), 1e-21);
      Delivery weaker = Deliveries.planned(TEN_LINES, INSTRUMENT, new Current(0.95e-9), 5, 2);
      assertEquals(GRANTED.upperCurrent(), weaker.upperCurrent());
      assertEquals(new Current(0.95e-9), weaker.bestCurrent());
    }

    @Test
    void countsFlybackThatNothingBlanks() {
      Abilities slow = Fixtures.instrument(0, 0, 0, Blanker.Kind.SLOW, BLANKING);
      Delivery delivery = Deliveries.planned(TEN_LINES, slow, Fixtures.ONE_NANOAMPERE, 5, 2);
      assertEquals(Duration.ofMillis(42), delivery.bestBeamOn());
      assertEquals(Duration.ofMillis(42).plus(BLANKING), delivery.upperBeamOn());
    }

    @Test
    void isRefusedWithoutAnyBlanker() {
      Abilities none = Fixtures.instrument(0, 0, 0, Blanker.Kind.NONE, BLANKING);
      assertEquals(
          "the instrument north-room has no blanker, and what a parked beam gives a sample cannot"
              + " be counted yet",
          assertThrows(
                  IllegalArgumentException.class,
                  () -> Deliveries.planned(TEN_LINES, none, Fixtures.ONE_NANOAMPERE, 5, 2))
              .getMessage());
    }
  }

  @Nested
  class AReceipt {
    @Test
    void isBookedAtWhatItTouched() {
      Delivery booked = believed(receipt(4, 5, Duration.ofMillis(18), 0.98e-9, 1.01e-9));
      assertEquals(5, booked.unitsTouched());
      assertEquals(Duration.ofMillis(18), booked.upperBeamOn());
      assertEquals(GRANTED.upperCurrent(), booked.upperCurrent());
      assertEquals(0.995e-9, booked.bestCurrent().amperes(), 1e-20);
      assertEquals(GRANTED.grant(), booked.grant());
      assertEquals(GRANTED.stay(), booked.stay());
    }

    @Test
    void withoutReadingsKeepsTheCurrentOfTheGrant() {
      Delivery booked = believed(receipt(10, 10, Duration.ofMillis(40), 0, 0));
      assertEquals(GRANTED.bestCurrent(), booked.bestCurrent());
    }

    @Test
    void ofNothingBooksNothing() {
      Delivery booked = believed(receipt(0, 0, Duration.ZERO, 0, 0));
      SampleDose dose = SampleDose.nothing(Fixtures.PLACED).plus(booked);
      assertEquals(0, dose.upper().coulombs());
    }

    @Test
    void isBookedAtNoLessThanItsWholeUnitsTake() {
      Delivery booked = believed(receipt(10, 10, Duration.ofNanos(39_700_000), 0, 0));
      assertEquals(Duration.ofMillis(40), booked.upperBeamOn());
    }
  }

  @Nested
  class AContradiction {
    @Test
    void isMoreUnitsThanGranted() {
      assertContradicts(
          "the receipt of grant 5 says 11 units touched, and 10 granted",
          receipt(10, 11, Duration.ofMillis(40), 0, 0));
    }

    @Test
    void isMoreBeamThanGranted() {
      assertContradicts(
          "the receipt of grant 5 says PT0.0402S of beam, and PT0.0401S granted",
          receipt(10, 10, Duration.ofNanos(40_200_000), 0, 0));
    }

    @Test
    void isLessBeamThanItsUnitsTake() {
      assertContradicts(
          "the receipt of grant 5 says PT0.02S of beam, and 10 units done, which take PT0.04S",
          receipt(10, 10, Duration.ofMillis(20), 0, 0));
    }

    @Test
    void isBeamThatTouchedNothing() {
      assertContradicts(
          "the receipt of grant 5 says PT0.02S of beam, and no unit touched",
          receipt(0, 0, Duration.ofMillis(20), 0, 0));
    }

    @Test
    void isACurrentAboveTheHighestGranted() {
      assertContradicts(
          "the receipt of grant 5 says 1.2 nA seen, and at most 1.133 nA granted",
          receipt(10, 10, Duration.ofMillis(40), 1e-9, 1.2e-9));
    }

    @Test
    void staysCountedAtTheHigherOfGrantAndReceipt() {
      Delivery atMost = contradicts(receipt(3, 4, Duration.ofMillis(50), 1e-9, 1.2e-9)).atMost();
      assertEquals(10, atMost.unitsTouched());
      assertEquals(Duration.ofMillis(50), atMost.upperBeamOn());
      assertEquals(1.2e-9 * 1.03 + 2e-13, atMost.upperCurrent().amperes(), 1e-21);
      assertEquals(1.2e-9, atMost.bestCurrent().amperes(), 1e-21);
    }
  }

  @Test
  void aWholeJobIsItsExposuresWithOneStayForEachTile() {
    Mosaic mosaic = new Mosaic(2, 1, 1e-4, 1e-4, 0.1, Fixtures.point(0, 0), 0);
    // 2.4 s a line, 60 lines a pass: three exposures each.
    Job job = Fixtures.map(mosaic, 100, 60, Duration.ofNanos(23_998_000), 1, "green", "red");
    List<Delivery> whole =
        Deliveries.whole(
            job,
            Fixtures.quartz(),
            INSTRUMENT,
            Fixtures.ONE_NANOAMPERE,
            Done.NOTHING,
            Optional.empty());
    assertEquals(12, whole.size());
    assertEquals(
        List.of(-1L, -1L, -1L, -1L, -1L, -1L, -2L, -2L, -2L, -2L, -2L, -2L),
        whole.stream().map(Delivery::stay).toList());
    assertEquals(12, whole.stream().map(Delivery::grant).distinct().count());
    Work work = Exposures.remaining(job, INSTRUMENT, Done.NOTHING, Optional.empty());
    assertEquals(work.exposures(), whole.size());
    assertEquals(
        work.beamOn(),
        whole.stream().map(Delivery::bestBeamOn).reduce(Duration.ZERO, Duration::plus));
  }

  private static Delivery believed(Receipt receipt) {
    return assertInstanceOf(
            Receiving.Believed.class, Deliveries.received(GRANTED, receipt, INSTRUMENT.meter()))
        .delivered();
  }

  private static Receiving.Contradicts contradicts(Receipt receipt) {
    return assertInstanceOf(
        Receiving.Contradicts.class, Deliveries.received(GRANTED, receipt, INSTRUMENT.meter()));
  }

  private static void assertContradicts(String because, Receipt receipt) {
    assertEquals(because, contradicts(receipt).because());
  }

  /** A receipt of the grant; currents of zero were not watched. */
  private static Receipt receipt(
      long done, long touched, Duration beamOn, double lowest, double highest) {
    return new Receipt(
        5,
        1,
        done,
        touched,
        beamOn,
        reading(lowest),
        reading(highest),
        Map.of(),
        List.of(),
        Optional.empty());
  }

  private static Optional<CurrentReading> reading(double amperes) {
    return amperes == 0
        ? Optional.empty()
        : Optional.of(
            new CurrentReading(
                new BeamSettings(new Voltage(10_000), Fixtures.ONE_NANOAMPERE),
                new Current(amperes)));
  }
}
