package beamwarden.report;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.time.Instant;
import java.time.LocalDate;
import java.util.Optional;
import org.junit.jupiter.api.Test;

class NightTest {
  private static final LocalDate WEDNESDAY = LocalDate.of(2031, 3, 12);
  private static final LocalDate FRIDAY = LocalDate.of(2031, 3, 14);

  @Test
  void isNamedAfterTheDateOnWhichItOpensThoughItEndsOnTheNext() {
    Night night = Night.at(Lab.CLOSES.minusSeconds(1), Lab.calendar(), Lab.ZONE).orElseThrow();
    assertEquals(WEDNESDAY, night.date());
    assertEquals(Lab.OPENS, night.from());
  }

  @Test
  void lastsUntilTheNextOneSoThatTheMorningBelongsToIt() {
    Night night = Night.on(WEDNESDAY, Lab.calendar(), Lab.ZONE).orElseThrow();
    assertEquals(Instant.parse("2031-03-13T18:00:00Z"), night.until());
    Instant noon = Instant.parse("2031-03-13T11:00:00Z");
    assertEquals(WEDNESDAY, Night.at(noon, Lab.calendar(), Lab.ZONE).orElseThrow().date());
  }

  @Test
  void spansAWeekendWithoutShifts() {
    Night night = Night.on(FRIDAY, Lab.calendar(), Lab.ZONE).orElseThrow();
    assertEquals(Instant.parse("2031-03-17T18:00:00Z"), night.until());
  }

  @Test
  void isNoneOnADateWithoutAShift() {
    assertEquals(Optional.empty(), Night.on(FRIDAY.plusDays(1), Lab.calendar(), Lab.ZONE));
  }

  @Test
  void canBeSeveralTakenAsOneForARehearsal() {
    Instant later = Lab.OPENS.plusSeconds(86_400);
    Night night = Night.spanning(Lab.OPENS, later, Lab.calendar(), Lab.ZONE).orElseThrow();
    assertEquals(WEDNESDAY, night.date());
    assertEquals(2, night.shifts().size());
  }
}
