package beamwarden.clockwork;

import static org.junit.jupiter.api.Assertions.assertEquals;

import beamwarden.timing.TimeAnchor;
import java.time.Duration;
import java.time.Instant;
import java.util.Optional;
import org.junit.jupiter.api.Test;

class WatchdogTest {
  private static final TimeAnchor REAL = TimeAnchor.real();
  private static final TimeAnchor PACED = new TimeAnchor(Instant.EPOCH, Instant.EPOCH, 600);
  private static final Alarm ALARM = new Alarm("HEARTBEAT", Instant.EPOCH);

  private final Watchdog watchdog = new Watchdog(Duration.ofHours(-1));

  private static long seconds(long seconds) {
    return Duration.ofSeconds(seconds).toNanos();
  }

  private Optional<Duration> step(Duration ahead) {
    return watchdog.look(ahead, 0, REAL).stepped();
  }

  private Optional<Watchdog.Stall> stall(long elapsedSeconds, TimeAnchor anchor) {
    return watchdog.look(Duration.ofHours(-1), seconds(elapsedSeconds), anchor).stalled();
  }

  @Test
  void overlooksAWallClockThatIsDisciplined() {
    assertEquals(Optional.empty(), step(Duration.ofHours(-1)));
    assertEquals(Optional.empty(), step(Duration.ofHours(-1).plusMillis(500)));
    assertEquals(Optional.empty(), step(Duration.ofHours(-1).minusMillis(500)));
  }

  @Test
  void tellsAStepOnceForwardAndBack() {
    assertEquals(Optional.of(Duration.ofHours(1)), step(Duration.ZERO));
    assertEquals(Optional.empty(), step(Duration.ZERO));
    assertEquals(Optional.of(Duration.ofMinutes(-5)), step(Duration.ofMinutes(-5)));
  }

  @Test
  void addsUpWhatALongDriftComesTo() {
    assertEquals(Optional.empty(), step(Duration.ofHours(-1).plusMillis(300)));
    assertEquals(Optional.of(Duration.ofMillis(600)), step(Duration.ofHours(-1).plusMillis(600)));
  }

  @Test
  void tellsOnceThatTheEngineHangs() {
    watchdog.handedOver(ALARM, seconds(100));
    assertEquals(Optional.empty(), stall(130, REAL));
    assertEquals(Optional.of(new Watchdog.Stall(ALARM, Duration.ofSeconds(31))), stall(131, REAL));
    assertEquals(Optional.empty(), stall(200, REAL));
  }

  @Test
  void countsRealTimeOnAPacedLine() {
    watchdog.handedOver(ALARM, 0);
    assertEquals(Optional.empty(), stall(30 * 600, PACED));
    assertEquals(
        Optional.of(new Watchdog.Stall(ALARM, Duration.ofSeconds(31))), stall(31 * 600, PACED));
  }

  @Test
  void isContentWithAnEngineThatSetsTheClockAnew() {
    watchdog.handedOver(ALARM, 0);
    watchdog.setAnew();
    assertEquals(Optional.empty(), stall(1000, REAL));
  }

  @Test
  void countsFromTheFirstAlarmThatWasNotAnswered() {
    watchdog.handedOver(ALARM, 0);
    watchdog.handedOver(new Alarm("WIND_DOWN", Instant.EPOCH), seconds(20));
    assertEquals(Optional.of(new Watchdog.Stall(ALARM, Duration.ofSeconds(31))), stall(31, REAL));
  }
}
