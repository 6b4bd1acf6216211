/**
 * The run of an instrument's nights: {@link beamwarden.run.Run} is a pure step from state and event
 * to state and commands, {@link beamwarden.run.Engine} carries the commands out on one thread,
 * {@link beamwarden.run.Rehearsal} does so in virtual time.
 *
 * <p>One class changes each thing: {@code LinkSteps} the connection, {@code ShiftSteps} the shift,
 * {@code WorkSteps} what is exposed next, {@code ExposureSteps} a grant on its way, {@code
 * JobSteps} a job's state, {@code WishSteps} what people ask. They share a {@code Turn}, the
 * working copy of one step.
 *
 * <p>May import {@code instrument}, {@code plan}, {@code estimate}, {@code ledger}, {@code dose},
 * {@code profile}, {@code queue}, {@code shift}, {@code timing}, {@code beam}, {@code quantity}.
 */
package beamwarden.run;
