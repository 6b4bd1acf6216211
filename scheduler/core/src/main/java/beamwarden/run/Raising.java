package beamwarden.run;

import beamwarden.dose.CapVerdict;
import beamwarden.quantity.Charge;
import beamwarden.quantity.Fluence;
import beamwarden.queue.Cap;
import beamwarden.queue.Sample;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/** Raises the cap that binds to what was asked, and no other. */
final class Raising {
  /** Sums are made in another order when they are made again; this much of them may differ. */
  private static final double ROUNDING = 1e-9;

  private Raising() {}

  /** The sample with that cap raised; empty when what binds is no cap of it: a keep-out area. */
  static Optional<Sample> of(Sample sample, CapVerdict.Refused refused) {
    int place = sample.caps().indexOf(refused.cap());
    if (place < 0) {
      return Optional.empty();
    }
    List<Cap> caps = new ArrayList<>(sample.caps());
    caps.set(place, higher(refused.cap(), (refused.booked() + refused.asked()) * (1 + ROUNDING)));
    return Optional.of(
        new Sample(
            sample.id(),
            sample.label(),
            sample.material(),
            sample.placement(),
            sample.areas(),
            caps));
  }

  private static Cap higher(Cap cap, double limit) {
    if (cap instanceof Cap.OnFluence fluence) {
      return new Cap.OnFluence(
          new Fluence(limit), fluence.averaging(), fluence.area(), fluence.because());
    }
    return new Cap.OnCharge(new Charge(limit), cap.area(), cap.because());
  }
}
