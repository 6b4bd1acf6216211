package beamwarden.shift;

import static beamwarden.shift.Rules.daily;
import static beamwarden.shift.Rules.hours;
import static beamwarden.shift.Rules.withLatestStart;
import static beamwarden.shift.Rules.withWindDown;
import static org.junit.jupiter.api.Assertions.assertEquals;

import java.time.Duration;
import java.time.Instant;
import java.time.ZoneId;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;

/**
 * Goal: shifts across clock changes are as long as they truly are. Method: nights whose instants
 * were worked out by hand from the IANA time zone database (files europe and northamerica):
 * Slovenia follows the EU rule (changes at 01:00 UTC on the last Sundays of March and October),
 * Newfoundland the rule of 2007 (changes at 02:00 local time on the second Sunday of March and the
 * first of November) on a standard time of UTC-3:30. Dates that are past cannot be changed by a law
 * to come.
 */
class ClockChangeTest {
  private static final ZoneId LJUBLJANA = ZoneId.of("Europe/Ljubljana");
  private static final ZoneId ST_JOHNS = ZoneId.of("America/St_Johns");
  private static final Duration TEN_MINUTES = Duration.ofMinutes(10);

  private static List<Shift> shifts(ZoneId zone, String from, long count, ShiftRule... rules) {
    return new ShiftCalendar(zone, List.of(rules), TEN_MINUTES)
        .from(Instant.parse(from))
        .limit(count)
        .toList();
  }

  private static void assertSpan(String opens, String closes, Shift shift) {
    assertEquals(Instant.parse(opens), shift.opens());
    assertEquals(Instant.parse(closes), shift.closes());
  }

  private static void assertNight(ZoneId zone, String opens, String closes, long hours) {
    // The noon before, so that no earlier night is still open.
    String noon = Instant.parse(opens).minus(Duration.ofHours(7)).toString();
    Shift night = shifts(zone, noon, 1, daily(hours("19:00", "07:00"))).get(0);
    assertSpan(opens, closes, night);
    assertEquals(Duration.ofHours(hours), Duration.between(night.opens(), night.closes()));
  }

  @Nested
  class Nights {
    @Test
    void springNightInLjubljanaHasElevenHours() {
      // Sat 30 March 2024 19:00 CET (UTC+1) = 18:00Z; Sun 07:00 CEST (UTC+2) = 05:00Z.
      assertNight(LJUBLJANA, "2024-03-30T18:00:00Z", "2024-03-31T05:00:00Z", 11);
    }

    @Test
    void autumnNightInLjubljanaHasThirteenHours() {
      // Sat 26 October 2024 19:00 CEST (UTC+2) = 17:00Z; Sun 07:00 CET (UTC+1) = 06:00Z.
      assertNight(LJUBLJANA, "2024-10-26T17:00:00Z", "2024-10-27T06:00:00Z", 13);
    }

    @Test
    void springNightInStJohnsHasElevenHours() {
      // Sat 9 March 2024 19:00 NST (UTC-3:30) = 22:30Z; Sun 07:00 NDT (UTC-2:30) = 09:30Z.
      assertNight(ST_JOHNS, "2024-03-09T22:30:00Z", "2024-03-10T09:30:00Z", 11);
    }

    @Test
    void autumnNightInStJohnsHasThirteenHours() {
      // Sat 2 November 2024 19:00 NDT (UTC-2:30) = 21:30Z; Sun 07:00 NST (UTC-3:30) = 10:30Z.
      assertNight(ST_JOHNS, "2024-11-02T21:30:00Z", "2024-11-03T10:30:00Z", 13);
    }

    @Test
    void theNightsBesideAClockChangeHaveTwelveHours() {
      // Fri 29 March 2024 19:00 CET = 18:00Z to Sat 07:00 CET = 06:00Z.
      assertNight(LJUBLJANA, "2024-03-29T18:00:00Z", "2024-03-30T06:00:00Z", 12);
      // Sun 31 March 2024 19:00 CEST = 17:00Z to Mon 07:00 CEST = 05:00Z.
      assertNight(LJUBLJANA, "2024-03-31T17:00:00Z", "2024-04-01T05:00:00Z", 12);
    }

    @Test
    void windDownIsTakenFromTheTrueClosing() {
      Shift night =
          shifts(LJUBLJANA, "2024-03-30T12:00:00Z", 1, daily(hours("19:00", "07:00"))).get(0);
      assertEquals(Instant.parse("2024-03-31T04:50:00Z"), night.usableEnd());
    }
  }

  /** In Ljubljana 02:00 to 03:00 on 31 March 2024 does not exist; the gap ends at 01:00Z. */
  @Nested
  class InTheGap {
    @Test
    void aShiftThatOpensInItOpensAtItsEnd() {
      // 02:30 is skipped: 01:00Z. 07:00 CEST = 05:00Z.
      Shift shift =
          shifts(LJUBLJANA, "2024-03-31T00:00:00Z", 1, daily(hours("02:30", "07:00"))).get(0);
      assertSpan("2024-03-31T01:00:00Z", "2024-03-31T05:00:00Z", shift);
    }

    @Test
    void aShiftThatClosesInItClosesAtItsEnd() {
      // 19:00 CET = 18:00Z; 02:30 is skipped: 01:00Z.
      Shift shift =
          shifts(LJUBLJANA, "2024-03-30T12:00:00Z", 1, daily(hours("19:00", "02:30"))).get(0);
      assertSpan("2024-03-30T18:00:00Z", "2024-03-31T01:00:00Z", shift);
    }

    @Test
    void aShiftThatLiesInItDoesNotOpenThatDay() {
      // Sat 02:10 CET = 01:10Z, none on Sunday, Mon 02:10 CEST = 00:10Z.
      List<Shift> shifts =
          shifts(LJUBLJANA, "2024-03-30T00:30:00Z", 2, daily(hours("02:10", "02:50")));
      assertSpan("2024-03-30T01:10:00Z", "2024-03-30T01:50:00Z", shifts.get(0));
      assertSpan("2024-04-01T00:10:00Z", "2024-04-01T00:50:00Z", shifts.get(1));
    }

    @Test
    void aShiftOfWhichItLeavesOnlyTheWindDownDoesNotOpenThatDay() {
      // 02:10 is skipped: 01:00Z; 03:30 CEST = 01:30Z; half an hour is all wind-down.
      ShiftRule rule = daily(withWindDown(hours("02:10", "03:30"), Duration.ofMinutes(30)));
      Shift first = shifts(LJUBLJANA, "2024-03-31T00:00:00Z", 1, rule).get(0);
      assertSpan("2024-04-01T00:10:00Z", "2024-04-01T01:30:00Z", first);
    }

    @Test
    void aLatestStartInItIsItsEnd() {
      ShiftRule rule = daily(withLatestStart(hours("19:00", "07:00"), "02:30"));
      Shift night = shifts(LJUBLJANA, "2024-03-30T12:00:00Z", 1, rule).get(0);
      assertEquals(Optional.of(Instant.parse("2024-03-31T01:00:00Z")), night.latestStart());
    }

    @Test
    void shiftsThatMeetInItStillMeet() {
      List<Shift> shifts =
          shifts(
              LJUBLJANA,
              "2024-03-30T12:00:00Z",
              2,
              daily(hours("19:00", "02:30")),
              daily(hours("02:30", "07:00")));
      assertSpan("2024-03-30T18:00:00Z", "2024-03-31T01:00:00Z", shifts.get(0));
      assertSpan("2024-03-31T01:00:00Z", "2024-03-31T05:00:00Z", shifts.get(1));
    }
  }

  /** In Ljubljana 02:00 to 03:00 on 27 October 2024 comes twice: from 00:00Z and from 01:00Z. */
  @Nested
  class InTheOverlap {
    @Test
    void aShiftThatOpensInItOpensTheFirstTime() {
      // The first 02:30 is CEST = 00:30Z; 07:00 CET = 06:00Z.
      Shift shift =
          shifts(LJUBLJANA, "2024-10-26T12:00:00Z", 1, daily(hours("02:30", "07:00"))).get(0);
      assertSpan("2024-10-27T00:30:00Z", "2024-10-27T06:00:00Z", shift);
    }

    @Test
    void aShiftThatClosesInItClosesTheSecondTime() {
      // 19:00 CEST = 17:00Z; the second 02:30 is CET = 01:30Z.
      Shift shift =
          shifts(LJUBLJANA, "2024-10-26T12:00:00Z", 1, daily(hours("19:00", "02:30"))).get(0);
      assertSpan("2024-10-26T17:00:00Z", "2024-10-27T01:30:00Z", shift);
    }

    @Test
    void aLatestStartInItIsTheFirstTime() {
      ShiftRule rule = daily(withLatestStart(hours("19:00", "07:00"), "02:30"));
      Shift night = shifts(LJUBLJANA, "2024-10-26T12:00:00Z", 1, rule).get(0);
      assertEquals(Optional.of(Instant.parse("2024-10-27T00:30:00Z")), night.latestStart());
    }

    @Test
    void aShiftClosesWhenTheNextOneOpensTheFirstTime() {
      List<Shift> shifts =
          shifts(
              LJUBLJANA,
              "2024-10-26T12:00:00Z",
              2,
              daily(hours("19:00", "02:30")),
              daily(hours("02:30", "07:00")));
      assertSpan("2024-10-26T17:00:00Z", "2024-10-27T00:30:00Z", shifts.get(0));
      assertSpan("2024-10-27T00:30:00Z", "2024-10-27T06:00:00Z", shifts.get(1));
    }

    @Test
    void theHalfHourZoneHasItsOwn() {
      // St John's repeats 01:00 to 02:00 on 3 November 2024: the first 01:30 is NDT = 04:00Z, the
      // second NST = 05:00Z.
      List<Shift> opening =
          shifts(ST_JOHNS, "2024-11-02T12:00:00Z", 1, daily(hours("01:30", "07:00")));
      assertSpan("2024-11-03T04:00:00Z", "2024-11-03T10:30:00Z", opening.get(0));
      List<Shift> closing =
          shifts(ST_JOHNS, "2024-11-02T12:00:00Z", 1, daily(hours("19:00", "01:30")));
      assertSpan("2024-11-02T21:30:00Z", "2024-11-03T05:00:00Z", closing.get(0));
    }
  }

  @Test
  void aDayThatTheZoneLeftOutIsOneGap() {
    // Apia went over the date line: 30 December 2011 never was; 31 December began at UTC+14, at
    // 10:00Z on the 30th. A night that opens on the missing day opens then, and closes at 07:00 =
    // 17:00Z of the 30th.
    Shift night =
        shifts(ZoneId.of("Pacific/Apia"), "2011-12-30T10:00:00Z", 1, daily(hours("19:00", "07:00")))
            .get(0);
    assertSpan("2011-12-30T10:00:00Z", "2011-12-30T17:00:00Z", night);
  }
}
