/**
 * Shift rules in the lab's local time, and the shifts that follow from them as instants.
 *
 * <p>{@link beamwarden.shift.ShiftRule Rules} are for single days of the week, single dates and
 * closures; {@link beamwarden.shift.ShiftCalendar} turns them into {@linkplain
 * beamwarden.shift.Shift shifts} by the time zone's rules and is the only place that knows of local
 * time.
 *
 * <p>May import nothing but the JDK.
 */
package beamwarden.shift;
