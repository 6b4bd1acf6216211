package beamwarden.dose;

import beamwarden.beam.Placement;
import beamwarden.quantity.Charge;
import java.util.ArrayList;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/**
 * All that a sample has received or may yet receive, over its whole history. Never changes: each
 * step makes a new one that shares what stayed.
 *
 * <p>Deliveries are kept by pass and stay, so that a night of ten thousand exposures is a few
 * hundred passes.
 */
public final class SampleDose {
  private final Placement placement;
  private final List<PassDose> passes;

  private SampleDose(Placement placement, List<PassDose> passes) {
    this.placement = placement;
    this.passes = List.copyOf(passes);
  }

  /** Nothing yet, of a sample that sits there. */
  public static SampleDose nothing(Placement placement) {
    return new SampleDose(placement, List.of());
  }

  /** This, and one more delivery; its grant must not be counted yet. */
  public SampleDose plus(Delivery delivery) {
    return plus(List.of(delivery));
  }

  /** This, and more deliveries; none of their grants may be counted yet. */
  public SampleDose plus(Collection<Delivery> deliveries) {
    Map<PassKey, Map<Long, Delivery>> byPass = new LinkedHashMap<>();
    for (Delivery delivery : deliveries) {
      Map<Long, Delivery> ofPass =
          byPass.computeIfAbsent(PassKey.of(delivery), key -> new LinkedHashMap<>());
      if (holds(delivery.grant()) || ofPass.put(delivery.grant(), delivery) != null) {
        throw new IllegalArgumentException("grant " + delivery.grant() + " is counted already");
      }
    }
    List<PassDose> sum = new ArrayList<>(passes);
    byPass.forEach((key, ofPass) -> add(sum, key, ofPass));
    return new SampleDose(placement, sum);
  }

  private static void add(List<PassDose> passes, PassKey key, Map<Long, Delivery> deliveries) {
    for (int i = passes.size() - 1; i >= 0; i--) {
      if (passes.get(i).key().equals(key)) {
        passes.set(i, passes.get(i).plus(deliveries));
        return;
      }
    }
    passes.add(PassDose.of(key, deliveries));
  }

  /** This, with what a grant is counted as replaced; the grant must be counted. */
  public SampleDose replacing(long grant, Delivery delivery) {
    return without(grant).plus(delivery);
  }

  /** This, without a grant that was proved unused; the grant must be counted. */
  public SampleDose without(long grant) {
    List<PassDose> rest = new ArrayList<>(passes);
    for (int i = rest.size() - 1; i >= 0; i--) {
      if (rest.get(i).holds(grant)) {
        PassDose pass = rest.remove(i).without(grant);
        if (!pass.isEmpty()) {
          rest.add(i, pass);
        }
        return new SampleDose(placement, rest);
      }
    }
    throw new IllegalArgumentException("grant " + grant + " is not counted");
  }

  /** Whether a grant is counted. */
  public boolean holds(long grant) {
    return passes.stream().anyMatch(pass -> pass.holds(grant));
  }

  /** The same history, of a sample that now sits there. */
  public SampleDose at(Placement present) {
    return present.equals(placement) ? this : new SampleDose(present, passes);
  }

  /** The best value of the charge received. */
  public Charge best() {
    return charge(Worth.BEST);
  }

  /** The upper value of the charge received. */
  public Charge upper() {
    return charge(Worth.UPPER);
  }

  private Charge charge(Worth worth) {
    return new Charge(passes.stream().mapToDouble(pass -> pass.coulombs(worth)).sum());
  }

  Placement placement() {
    return placement;
  }

  /** The passes that left a footprint; what touched nothing has none. */
  List<PassDose> exposed() {
    return passes.stream().filter(PassDose::touchesAnything).toList();
  }

  List<PassDose> passes() {
    return passes;
  }
}
