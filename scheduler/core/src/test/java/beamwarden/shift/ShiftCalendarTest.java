package beamwarden.shift;

import static beamwarden.shift.Rules.closed;
import static beamwarden.shift.Rules.daily;
import static beamwarden.shift.Rules.hours;
import static beamwarden.shift.Rules.on;
import static beamwarden.shift.Rules.weekly;
import static beamwarden.shift.Rules.withBudget;
import static beamwarden.shift.Rules.withLatestStart;
import static beamwarden.shift.Rules.withWindDown;
import static java.time.DayOfWeek.FRIDAY;
import static java.time.DayOfWeek.MONDAY;
import static java.time.DayOfWeek.SATURDAY;
import static java.time.DayOfWeek.SUNDAY;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.time.Duration;
import java.time.Instant;
import java.time.ZoneId;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Nested;
import org.junit.jupiter.api.Test;

/** In UTC, so that local times and instants read the same; 1 January 2024 is a Monday. */
class ShiftCalendarTest {
  private static final Duration TEN_MINUTES = Duration.ofMinutes(10);

  private static ShiftCalendar calendar(ShiftRule... rules) {
    return new ShiftCalendar(ZoneId.of("UTC"), List.of(rules), TEN_MINUTES);
  }

  private static Instant at(String moment) {
    return Instant.parse(moment + ":00Z");
  }

  private static List<Instant> openings(ShiftCalendar calendar, String from, int count) {
    return calendar.from(at(from)).limit(count).map(Shift::opens).toList();
  }

  private static void assertRefused(String message, ShiftRule... rules) {
    Exception refusal =
        assertThrows(IllegalArgumentException.class, () -> calendar(rules), "not refused");
    assertEquals(message, refusal.getMessage());
  }

  @Nested
  class TheCurrentShift {
    private final ShiftCalendar nights = calendar(daily(hours("19:00", "07:00")));

    @Test
    void beginsWithItsOpening() {
      assertEquals(Optional.empty(), nights.current(at("2024-01-01T18:59")));
      assertEquals(
          Optional.of(at("2024-01-01T19:00")),
          nights.current(at("2024-01-01T19:00")).map(Shift::opens));
    }

    @Test
    void lastsAcrossMidnightUntilItsClosing() {
      assertEquals(
          Optional.of(at("2024-01-01T19:00")),
          nights.current(at("2024-01-02T06:59")).map(Shift::opens));
      assertEquals(Optional.empty(), nights.current(at("2024-01-02T07:00")));
    }

    @Test
    void mayTakeTheWholeDay() {
      ShiftCalendar always = calendar(daily(hours("07:00", "07:00")));
      Shift shift = always.current(at("2024-01-02T06:59")).orElseThrow();
      assertEquals(at("2024-01-01T07:00"), shift.opens());
      assertEquals(at("2024-01-02T07:00"), shift.closes());
    }
  }

  @Nested
  class ShiftsToCome {
    private final ShiftCalendar week =
        calendar(
            weekly(hours("19:00", "07:00"), MONDAY, FRIDAY),
            weekly(hours("09:00", "17:00"), SATURDAY, SUNDAY));

    @Test
    void nextIsTheFirstThatOpensAfterTheMoment() {
      assertEquals(
          Optional.of(at("2024-01-05T19:00")), week.next(at("2024-01-01T19:00")).map(Shift::opens));
      assertEquals(
          Optional.of(at("2024-01-01T19:00")), week.next(at("2024-01-01T18:59")).map(Shift::opens));
    }

    @Test
    void comeInOrderTheCurrentOneFirst() {
      assertEquals(
          List.of(
              at("2024-01-05T19:00"),
              at("2024-01-06T09:00"),
              at("2024-01-07T09:00"),
              at("2024-01-08T19:00")),
          openings(week, "2024-01-06T03:00", 4));
    }

    @Test
    void endAtTheHorizon() {
      ShiftCalendar nights = calendar(daily(hours("19:00", "07:00")));
      assertEquals(ShiftCalendar.HORIZON_DAYS + 1, nights.from(at("2024-01-01T12:00")).count());
    }

    @Test
    void areNoneWithoutRules() {
      assertEquals(Optional.empty(), calendar().next(at("2024-01-01T12:00")));
      assertEquals(Optional.empty(), calendar().current(at("2024-01-01T12:00")));
    }

    @Test
    void beyondTheHorizonAreNotSeen() {
      ShiftCalendar far = calendar(on("2026-01-01", hours("19:00", "07:00")));
      assertEquals(Optional.empty(), far.next(at("2024-01-01T12:00")));
      assertTrue(far.next(at("2025-12-01T12:00")).isPresent());
    }
  }

  @Nested
  class SingleDates {
    @Test
    void replaceTheWeeklyShiftsThatOpenOnThem() {
      ShiftCalendar calendar =
          calendar(
              daily(hours("09:00", "12:00")),
              daily(hours("19:00", "07:00")),
              on("2024-01-02", hours("21:00", "05:00")));
      assertEquals(
          List.of(
              at("2024-01-01T09:00"),
              at("2024-01-01T19:00"),
              at("2024-01-02T21:00"),
              at("2024-01-03T09:00")),
          openings(calendar, "2024-01-01T08:00", 4));
    }

    @Test
    void mayHaveSeveralShifts() {
      ShiftCalendar calendar =
          calendar(
              on("2024-01-02", hours("19:00", "23:00")), on("2024-01-02", hours("09:00", "12:00")));
      assertEquals(
          List.of(at("2024-01-02T09:00"), at("2024-01-02T19:00")),
          openings(calendar, "2024-01-01T12:00", 5));
    }

    @Test
    void whenClosedLetTheNightBeforeRunToItsEnd() {
      ShiftCalendar calendar = calendar(daily(hours("19:00", "07:00")), closed("2024-01-02"));
      assertTrue(calendar.current(at("2024-01-02T06:59")).isPresent());
      assertEquals(Optional.empty(), calendar.current(at("2024-01-02T20:00")));
      assertEquals(
          List.of(at("2024-01-01T19:00"), at("2024-01-03T19:00")),
          openings(calendar, "2024-01-01T12:00", 2));
    }

    @Test
    void cannotBeClosedAndHaveAShift() {
      assertRefused(
          "2024-01-02 is closed and has a shift of its own: take one of the two rules out",
          on("2024-01-02", hours("19:00", "07:00")),
          closed("2024-01-02"));
    }
  }

  @Nested
  class WhatAShiftAllows {
    private Shift only(ShiftRule rule) {
      return calendar(rule).next(at("2024-01-01T12:00")).orElseThrow();
    }

    @Test
    void hasTheUsualWindDownUnlessItSaysOtherwise() {
      assertEquals(at("2024-01-02T06:50"), only(daily(hours("19:00", "07:00"))).usableEnd());
      assertEquals(
          at("2024-01-02T06:15"),
          only(daily(withWindDown(hours("19:00", "07:00"), Duration.ofMinutes(45)))).usableEnd());
    }

    @Test
    void hasItsLatestStartOnTheSameEvening() {
      assertEquals(
          Optional.of(at("2024-01-01T23:30")),
          only(daily(withLatestStart(hours("19:00", "07:00"), "23:30"))).latestStart());
    }

    @Test
    void hasItsLatestStartAfterMidnight() {
      assertEquals(
          Optional.of(at("2024-01-02T04:00")),
          only(daily(withLatestStart(hours("19:00", "07:00"), "04:00"))).latestStart());
    }

    @Test
    void keepsItsBudgetAndWhetherSomebodyIsThere() {
      Shift shift = only(daily(withBudget(hours("19:00", "07:00"), Duration.ofHours(6))));
      assertEquals(Optional.of(Duration.ofHours(6)), shift.beamOnBudget());
      assertTrue(shift.unattended());
    }
  }

  @Nested
  class RefusedAtOnce {
    @Test
    void weeklyShiftsThatOverlapAcrossMidnight() {
      assertRefused(
          "the shifts Fri 19:00 to 07:00 and Sat 06:00 to 12:00 overlap: let the first close before"
              + " the second opens",
          weekly(hours("06:00", "12:00"), SATURDAY),
          weekly(hours("19:00", "07:00"), FRIDAY));
    }

    @Test
    void weeklyShiftsThatOverlapAcrossTheEndOfTheWeek() {
      assertRefused(
          "the shifts Sun 19:00 to 07:00 and Mon 06:00 to 12:00 overlap: let the first close before"
              + " the second opens",
          weekly(hours("06:00", "12:00"), MONDAY),
          weekly(hours("19:00", "07:00"), SUNDAY));
    }

    @Test
    void aShiftOnOneDateThatOverlapsTheNightBefore() {
      assertRefused(
          "the shifts 2024-01-01 19:00 to 07:00 and 2024-01-02 05:00 to 09:00 overlap: let the"
              + " first close before the second opens",
          daily(hours("19:00", "07:00")),
          on("2024-01-02", hours("05:00", "09:00")));
    }

    @Test
    void aShiftOnOneDateThatOverlapsTheNextDay() {
      assertRefused(
          "the shifts 2024-01-02 19:00 to 10:00 and 2024-01-03 09:00 to 17:00 overlap: let the"
              + " first close before the second opens",
          daily(hours("09:00", "17:00")),
          on("2024-01-02", hours("19:00", "10:00")));
    }

    @Test
    void butNotShiftsThatOnlyTouch() {
      ShiftCalendar calendar =
          calendar(daily(hours("19:00", "07:00")), daily(hours("07:00", "19:00")));
      assertEquals(
          List.of(at("2024-01-01T07:00"), at("2024-01-01T19:00")),
          openings(calendar, "2024-01-01T12:00", 2));
    }

    @Test
    void aWindDownAsLongAsTheShift() {
      assertRefused(
          "the shift 19:00 to 20:00 has a wind-down of PT1H: it must be shorter than PT1H",
          daily(withWindDown(hours("19:00", "20:00"), Duration.ofHours(1))));
    }

    @Test
    void aLatestStartAtOrAfterTheClosing() {
      assertRefused(
          "the shift 19:00 to 07:00 has a latest start of 07:00: name one within it",
          daily(withLatestStart(hours("19:00", "07:00"), "07:00")));
      assertRefused(
          "the shift 09:00 to 17:00 has a latest start of 08:00: name one within it",
          daily(withLatestStart(hours("09:00", "17:00"), "08:00")));
    }

    @Test
    void aBeamOnBudgetOfNothing() {
      assertRefused(
          "the shift 19:00 to 07:00 has a beam-on budget of PT0S: it must be above zero",
          daily(withBudget(hours("19:00", "07:00"), Duration.ZERO)));
    }
  }
}
