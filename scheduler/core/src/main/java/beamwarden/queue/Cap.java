package beamwarden.queue;

import beamwarden.quantity.Charge;
import beamwarden.quantity.Fluence;
import java.util.Optional;

/** A limit on cumulative dose. */
public sealed interface Cap {
  /** The name of the area in which it holds; empty for the whole sample. */
  Optional<String> area();

  /** Why it was set, in its owner's words; may be empty. */
  String because();

  /**
   * A limit on the highest local fluence.
   *
   * @param limit the limit, zero or more
   * @param averaging over what length it averages
   * @param area the area in which it holds
   * @param because why
   */
  record OnFluence(Fluence limit, Averaging averaging, Optional<String> area, String because)
      implements Cap {}

  /**
   * A limit on the charge sent in.
   *
   * @param limit the limit, zero or more
   * @param area the area in which it holds
   * @param because why
   */
  record OnCharge(Charge limit, Optional<String> area, String because) implements Cap {}
}
