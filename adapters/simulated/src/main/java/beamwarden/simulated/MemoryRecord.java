package beamwarden.simulated;

import java.util.ArrayList;
import java.util.List;

/** The truth of a virtual night, kept in memory. Safe for use by several threads. */
public final class MemoryRecord implements DeliveredRecord {
  private final List<Stretch> stretches = new ArrayList<>();

  MemoryRecord() {}

  @Override
  public synchronized void append(List<Stretch> more) {
    stretches.addAll(more);
  }

  @Override
  public synchronized boolean holds(long grant, long fence) {
    return stretches.stream()
        .anyMatch(one -> one.grant().orElse(-1) == grant && one.fence() == fence);
  }

  /** Every stretch so far, in order. */
  public synchronized List<Stretch> stretches() {
    return List.copyOf(stretches);
  }

  /** The stretches from a place in the order on: what has been added since one looked. */
  public synchronized List<Stretch> stretchesFrom(int first) {
    return List.copyOf(stretches.subList(first, stretches.size()));
  }
}
