/**
 * Orders jobs around shifts and caps, and explains each placement and each refusal.
 *
 * <p>May import {@code estimate}, {@code ledger}, {@code dose}, {@code profile}, {@code queue},
 * {@code shift}, {@code beam} and {@code quantity}.
 */
package beamwarden.plan;
