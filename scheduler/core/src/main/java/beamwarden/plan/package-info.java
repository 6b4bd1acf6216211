/**
 * Says which job comes next, what fits where, and when things will happen.
 *
 * <p>{@link beamwarden.plan.Planner} orders the jobs; {@link beamwarden.plan.Settling} says which
 * change of a job's state is due, {@link beamwarden.plan.Fitting} which exposure fits into a shift:
 * the run obeys both. {@link beamwarden.plan.Walk} follows them through the coming shifts, and
 * {@link beamwarden.plan.Check} tells a user beforehand.
 *
 * <p>May import {@code estimate}, {@code ledger}, {@code dose}, {@code queue}, {@code shift},
 * {@code instrument} (abilities, and receipts as values), {@code beam} and {@code quantity}.
 */
package beamwarden.plan;
