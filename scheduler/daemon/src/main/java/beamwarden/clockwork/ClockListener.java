package beamwarden.clockwork;

import java.time.Duration;

/**
 * Is told what a clock notices. Called on threads of the clock's own: hand over and return.
 *
 * <p>An alarm is a hint. Whoever is woken does everything that is due by its own line of time, then
 * sets the clock anew, whether or not anything was due.
 */
public interface ClockListener {
  /** An alarm is due; never called before its moment. */
  void due(Alarm alarm);

  /**
   * The machine's wall clock was set, or ran away.
   *
   * @param step how far it jumped ahead; below zero when it was set back
   */
  void wallStepped(Duration step);

  /**
   * Nobody has set the clock anew since an alarm was handed over: the engine hangs. Told once for
   * each alarm.
   *
   * @param alarm the alarm
   * @param since how long ago it was handed over, in real time
   */
  void stalled(Alarm alarm, Duration since);
}
