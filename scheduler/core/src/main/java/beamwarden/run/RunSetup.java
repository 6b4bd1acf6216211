package beamwarden.run;

import beamwarden.plan.Planner;
import beamwarden.profile.Profile;
import beamwarden.shift.ShiftCalendar;

/**
 * What does not change while a run lasts.
 *
 * @param profile the instrument profile
 * @param calendar the shifts it makes
 * @param waits the waits
 * @param planner what orders the jobs
 * @param store the id of the store that keeps the books
 */
public record RunSetup(
    Profile profile, ShiftCalendar calendar, RunSettings waits, Planner planner, String store) {}
