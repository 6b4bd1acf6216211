package beamwarden.clockwork;

import beamwarden.timing.TimeAnchor;
import beamwarden.timing.Timeline;
import java.time.Duration;
import java.time.Instant;
import java.util.Collection;
import java.util.HashMap;
import java.util.Map;
import java.util.Set;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/**
 * Wakes the engine at the moments it asked for, on its own line of time, by way of Quartz.
 *
 * <p>Quartz goes by the wall clock and in real time; the engine lives on a line of time that may be
 * paced and that no step of the wall clock moves. So a wait on the line becomes a wait in real
 * time, rounded up; whatever fires too early is set again; and a watchdog that goes by elapsed time
 * as well as by Quartz sets every timer anew when the wall clock was set, which would otherwise
 * hold them back or bring them forward.
 *
 * <p>Safe for use by several threads. The listener is called without a lock.
 */
public final class QuartzClock implements AutoCloseable {
  private static final Logger LOGGER = LoggerFactory.getLogger(QuartzClock.class);
  private static final String WATCHDOG = "watchdog";

  /** The period of the watchdog, in real time. */
  static final Duration WATCH_EVERY = Duration.ofSeconds(1);

  /** Quartz fires up to 2 ms early: so much is added to a wait, to spare most second firings. */
  private static final Duration EARLINESS = Duration.ofMillis(3);

  /** No timer waits longer; a longer wait is set again on the way. */
  private static final Duration LONGEST_WAIT = Duration.ofDays(1);

  private final Timeline line;
  private final TimeAnchor anchor;
  private final WallClock wall;
  private final ClockListener listener;
  private final Duration watchEvery;
  private final Watchdog watchdog;
  private final QuartzTimers timers;

  /** By reason; guarded by this. */
  private final Map<String, Alarm> armed = new HashMap<>();

  private Timeline.Waiting nextBeat;
  private boolean closed;

  /**
   * Starts a clock without alarms.
   *
   * @param line the engine's line of time
   * @param anchor how the line goes, which gives its pace
   * @param wall the machine's wall clock
   * @param listener who is told
   */
  public QuartzClock(Timeline line, TimeAnchor anchor, WallClock wall, ClockListener listener) {
    this(line, anchor, wall, listener, WATCH_EVERY);
  }

  QuartzClock(
      Timeline line,
      TimeAnchor anchor,
      WallClock wall,
      ClockListener listener,
      Duration watchEvery) {
    this.line = line;
    this.anchor = anchor;
    this.wall = wall;
    this.listener = listener;
    this.watchEvery = watchEvery;
    this.watchdog = new Watchdog(wall.ahead().get());
    this.timers = new QuartzTimers(this::fired);
    synchronized (this) {
      timers.every(WATCHDOG, wall.time().instant(), watchEvery);
      beatLater();
    }
  }

  /**
   * Replaces all alarms. One whose moment has passed is due at once.
   *
   * @param alarms the alarms; of several with the same reason the earliest counts
   */
  public synchronized void wakeAt(Collection<Alarm> alarms) {
    if (closed) {
      return;
    }
    watchdog.setAnew();
    Map<String, Alarm> wanted = new HashMap<>();
    alarms.forEach(alarm -> wanted.merge(alarm.reason(), alarm, QuartzClock::earlier));
    for (String reason : Set.copyOf(armed.keySet())) {
      if (!wanted.containsKey(reason)) {
        armed.remove(reason);
        timers.cancel(timer(reason));
      }
    }
    for (Alarm alarm : wanted.values()) {
      if (!alarm.equals(armed.put(alarm.reason(), alarm))) {
        arm(alarm);
      }
    }
  }

  private static Alarm earlier(Alarm one, Alarm other) {
    return other.at().isBefore(one.at()) ? other : one;
  }

  private void arm(Alarm alarm) {
    timers.once(timer(alarm.reason()), onWall(alarm.at()));
  }

  /** The wall-clock moment at which the line will have got there, or a stop on the way. */
  private Instant onWall(Instant at) {
    Duration wait = anchor.real(Duration.between(line.instant(), at));
    if (wait.isNegative()) {
      return wall.time().instant();
    }
    Duration shorter = wait.compareTo(LONGEST_WAIT) < 0 ? wait : LONGEST_WAIT;
    return wall.time().instant().plus(shorter).plus(EARLINESS);
  }

  /** Quartz's thread comes in here. */
  private void fired(String timer) {
    if (timer.equals(WATCHDOG)) {
      watch();
    } else {
      wake(timer.substring(timer.indexOf(' ') + 1));
    }
  }

  /** Apart from the watchdog's, whatever a reason is called. */
  private static String timer(String reason) {
    return "wake " + reason;
  }

  private void wake(String reason) {
    Alarm alarm;
    synchronized (this) {
      alarm = armed.get(reason);
      if (closed || alarm == null) {
        return; // It was replaced while it fired.
      }
      if (line.instant().isBefore(alarm.at())) {
        arm(alarm);
        return;
      }
      armed.remove(reason);
      watchdog.handedOver(alarm, line.elapsedNanos());
    }
    listener.due(alarm);
  }

  /** The thread of the line of time comes in here: it goes on when Quartz does not. */
  private void beat() {
    try {
      watch();
    } finally {
      synchronized (this) {
        beatLater();
      }
    }
  }

  private void beatLater() {
    if (!closed) {
      Duration onLine = Duration.ofNanos((long) (watchEvery.toNanos() * anchor.pace()));
      nextBeat = line.after(onLine, this::beat);
    }
  }

  private void watch() {
    Watchdog.Finding finding;
    synchronized (this) {
      if (closed) {
        return;
      }
      finding = watchdog.look(wall.ahead().get(), line.elapsedNanos(), anchor);
      if (finding.stepped().isPresent()) {
        armed.values().forEach(this::arm);
        timers.every(WATCHDOG, wall.time().instant().plus(watchEvery), watchEvery);
      }
    }
    finding.stepped().ifPresent(this::tellStep);
    finding.stalled().ifPresent(this::tellStall);
  }

  private void tellStep(Duration step) {
    LOGGER.atWarn().addKeyValue("step", step).log("The wall clock was set");
    listener.wallStepped(step);
  }

  private void tellStall(Watchdog.Stall stall) {
    LOGGER.atError().addKeyValue("alarm", stall.alarm()).log("The engine hangs");
    listener.stalled(stall.alarm(), stall.since());
  }

  /** Stops the clock; no alarm is handed over after this returns. */
  @Override
  public void close() {
    synchronized (this) {
      closed = true;
      nextBeat.cancel();
    }
    timers.close();
  }
}
