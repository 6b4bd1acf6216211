package beamwarden.system.bad.left;

import java.time.Clock;
import java.time.Instant;
import java.time.InstantSource;
import java.time.LocalDate;
import java.time.LocalDateTime;
import java.time.ZoneId;
import java.time.ZoneOffset;
import java.time.ZonedDateTime;
import java.util.Date;
import java.util.List;
import java.util.function.Supplier;

/** Reads the machine's clock in every way there is. */
final class ClockReader {
  private ClockReader() {}

  static List<Object> readings() {
    return List.of(
        Instant.now(),
        LocalDate.now(ZoneOffset.UTC),
        LocalDateTime.now(ZoneOffset.UTC),
        ZonedDateTime.now(ZoneOffset.UTC),
        Clock.systemUTC(),
        Clock.system(ZoneOffset.UTC),
        InstantSource.system(),
        System.currentTimeMillis(),
        System.nanoTime());
  }

  @SuppressWarnings("JavaUtilDate")
  static Date date() {
    return new Date();
  }

  static Supplier<Instant> later() {
    return Instant::now;
  }

  /** Not the machine's: these are no breach. */
  static List<Object> ofAnotherClock(Clock clock) {
    return List.of(Instant.now(clock), LocalDate.now(clock), ZoneId.of("UTC"));
  }
}
