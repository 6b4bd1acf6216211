package beamwarden.clockwork;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.clockwork.Told.Arrival;
import beamwarden.timing.PacedTime;
import beamwarden.timing.TimeAnchor;
import java.time.Duration;
import java.time.Instant;
import java.time.InstantSource;
import java.util.ArrayList;
import java.util.Collection;
import java.util.List;
import java.util.Random;
import java.util.TreeMap;
import java.util.concurrent.atomic.AtomicReference;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.Timeout;

/**
 * Goal: alarms come through Quartz, none lost and none early. Method: Quartz itself on a line of
 * time that runs a thousand times faster than real time.
 */
@Timeout(60)
class QuartzClockTest {
  private static final double PACE = 1000;
  private static final Instant BEGIN = Instant.parse("2031-03-12T18:00:00Z");

  private final TimeAnchor anchor = new TimeAnchor(BEGIN, InstantSource.system().instant(), PACE);
  private final PacedTime line = new PacedTime(anchor, "line");
  private final Told told = new Told(line);

  /** How far the wall clock of the test is ahead of the machine's. */
  private final AtomicReference<Duration> ahead = new AtomicReference<>(Duration.ZERO);

  private final WallClock wall =
      new WallClock(() -> InstantSource.system().instant().plus(ahead.get()), ahead::get);

  private final QuartzClock clock =
      new QuartzClock(line, anchor, wall, told, Duration.ofMillis(20));

  @AfterEach
  void stop() {
    clock.close();
    line.close();
  }

  private Alarm alarm(String reason, Duration fromNow) {
    return new Alarm(reason, line.instant().plus(fromNow));
  }

  private static void assertNotEarly(Arrival arrival) {
    assertFalse(arrival.at().isBefore(arrival.alarm().at()), () -> "early: " + arrival);
  }

  @Test
  void aThousandAlarmsOneAfterTheOtherAllComeAndNoneEarly() throws InterruptedException {
    Random random = new Random(7);
    for (int count = 0; count < 1000; count++) {
      Alarm alarm = alarm("HEARTBEAT", Duration.ofMillis(random.nextInt(4000)));
      clock.wakeAt(List.of(alarm));
      Arrival arrival = told.next();
      assertEquals(alarm, arrival.alarm());
      assertNotEarly(arrival);
    }
    told.assertNothingElse();
  }

  @Test
  void aThousandAlarmsSetAsOneAllComeAndNoneEarly() throws InterruptedException {
    Random random = new Random(8);
    TreeMap<String, Alarm> missing = new TreeMap<>();
    for (int count = 0; count < 1000; count++) {
      String reason = "JOB_DUE " + count;
      missing.put(reason, alarm(reason, Duration.ofMillis(random.nextInt(1_000_000))));
    }
    clock.wakeAt(missing.values());
    while (!missing.isEmpty()) {
      Arrival arrival = told.next();
      assertNotEarly(arrival);
      assertEquals(missing.remove(arrival.alarm().reason()), arrival.alarm());
    }
    told.assertNothingElse();
  }

  @Test
  void aShiftOpensWindsDownAndClosesInOrder() throws InterruptedException {
    List<Alarm> shift =
        List.of(
            alarm("SHIFT_CLOSES", Duration.ofMinutes(12)),
            alarm("SHIFT_OPENS", Duration.ofMinutes(1)),
            alarm("WIND_DOWN", Duration.ofMinutes(10)));
    clock.wakeAt(shift);
    List<String> order = new ArrayList<>();
    for (int count = 0; count < shift.size(); count++) {
      Arrival arrival = told.next();
      assertNotEarly(arrival);
      order.add(arrival.alarm().reason());
    }
    assertEquals(List.of("SHIFT_OPENS", "WIND_DOWN", "SHIFT_CLOSES"), order);
  }

  @Test
  void anAlarmWhoseMomentHasPassedIsDueAtOnce() throws InterruptedException {
    Alarm past = alarm("RETRY", Duration.ofDays(-400));
    clock.wakeAt(List.of(past));
    assertEquals(past, told.next().alarm());
  }

  @Test
  void ofAlarmsWithOneReasonTheEarliestCounts() throws InterruptedException {
    Alarm sooner = alarm("ANSWER_DUE", Duration.ofMinutes(1));
    Alarm later = alarm("ANSWER_DUE", Duration.ofMinutes(2));
    Alarm last = alarm("SHIFT_CLOSES", Duration.ofMinutes(4));
    clock.wakeAt(List.of(later, sooner, last));
    assertEquals(sooner, told.next().alarm());
    assertEquals(last, told.next().alarm());
    told.assertNothingElse();
  }

  @Test
  void alarmsThatWereReplacedDoNotCome() throws InterruptedException {
    Alarm dropped = alarm("READING_DUE", Duration.ofMinutes(1));
    Alarm moved = alarm("HEARTBEAT", Duration.ofMinutes(1));
    clock.wakeAt(List.of(dropped, moved));
    Alarm movedTo = alarm("HEARTBEAT", Duration.ofMinutes(3));
    clock.wakeAt(List.of(movedTo));
    assertEquals(movedTo, told.next().alarm());
    told.assertNothingElse();
  }

  @Test
  void aWallClockThatWasSetBackDelaysNoAlarm() throws InterruptedException {
    ahead.set(Duration.ofHours(1));
    assertEquals(Duration.ofHours(1), told.nextStep());
    Alarm alarm = alarm("SHIFT_OPENS", Duration.ofMinutes(5));
    // For Quartz, whose clock the test cannot set, this timer is now an hour and 0.3 s away.
    clock.wakeAt(List.of(alarm));
    ahead.set(Duration.ZERO);
    assertEquals(Duration.ofHours(-1), told.nextStep());
    Arrival arrival = told.next();
    assertEquals(alarm, arrival.alarm());
    assertNotEarly(arrival);
    assertTrue(
        Duration.between(alarm.at(), arrival.at()).compareTo(Duration.ofHours(1)) < 0,
        () -> "not within a real time of 3.6 s: " + arrival);
  }

  @Test
  void aWallClockThatWasSetForwardBringsNoAlarmEarly() throws InterruptedException {
    ahead.set(Duration.ofHours(-1));
    assertEquals(Duration.ofHours(-1), told.nextStep());
    // Set for an hour ago by Quartz's clock, so that it fires at once, and again until it is due.
    Alarm alarm = alarm("SHIFT_OPENS", Duration.ofMinutes(1));
    clock.wakeAt(List.of(alarm));
    Arrival arrival = told.next();
    assertEquals(alarm, arrival.alarm());
    assertNotEarly(arrival);
  }

  @Test
  void leavesNoThreadAndHandsOverNothingOnceItIsClosed() throws InterruptedException {
    Collection<Thread> ofQuartz = threadsOfQuartz();
    assertFalse(ofQuartz.isEmpty());
    clock.wakeAt(List.of(alarm("HEARTBEAT", Duration.ofMinutes(1))));
    clock.close();
    for (Thread thread : ofQuartz) {
      thread.join(Duration.ofSeconds(10).toMillis());
      assertFalse(thread.isAlive(), () -> thread + " is left");
    }
    clock.wakeAt(List.of(alarm("HEARTBEAT", Duration.ZERO)));
    clock.close();
    told.assertNothingElse();
    assertEquals(List.of(), List.copyOf(threadsOfQuartz()));
  }

  private static Collection<Thread> threadsOfQuartz() {
    return Thread.getAllStackTraces().keySet().stream()
        .filter(thread -> thread.getName().startsWith("clock-"))
        .toList();
  }
}
