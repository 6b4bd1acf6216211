package beamwarden.simulated;

import beamwarden.quantity.Current;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;

/**
 * What one scan's beam came to, from its first electron until it went off.
 *
 * <p>The current moves slowly; in parts of at most ten minutes it is within one percent of its
 * mean, so that each part's stretch says what its own place received.
 */
final class Account {
  private static final long LONGEST_PART_NANOS = Duration.ofMinutes(10).toNanos();
  private static final double NANO = 1e-9;

  private final BeamPath path;
  private final TrueCurrent current;
  private final double firstSeconds;
  private final long offNanos;
  private final List<Long> cuts;

  /**
   * An account.
   *
   * @param firstSeconds when the first electron came, on the current's own time
   * @param surgeNanos when a surge began, from the first electron on; it may lie outside
   * @param offNanos when the beam went off, from the first electron on
   */
  Account(BeamPath path, TrueCurrent current, double firstSeconds, long surgeNanos, long offNanos) {
    this.path = path;
    this.current = current;
    this.firstSeconds = firstSeconds;
    this.offNanos = offNanos;
    this.cuts = cuts(surgeNanos, current.wanders() ? LONGEST_PART_NANOS : Long.MAX_VALUE);
  }

  /** The truth, part by part. */
  List<Stretch> stretches(TrueScan scan) {
    List<Stretch> stretches = new ArrayList<>();
    for (int part = 1; part < cuts.size(); part++) {
      long from = cuts.get(part - 1);
      long to = cuts.get(part);
      stretches.addAll(scan.stretches(from, to, mean(from, to)));
    }
    return stretches;
  }

  /** What a monitor shows that errs outwards by so much. */
  Outcome outcome(double monitorError) {
    double lowest = Double.POSITIVE_INFINITY;
    double highest = 0;
    for (int part = 1; part < cuts.size(); part++) {
      long from = cuts.get(part - 1);
      long to = cuts.get(part);
      double moves = current.moves((to - from) * NANO);
      lowest = Math.min(lowest, mean(from, to) - moves);
      highest = Math.max(highest, mean(from, to) + moves);
    }
    return new Outcome(
        path.at(offNanos),
        new Current(Math.min(lowest, highest) * (1 - monitorError)),
        new Current(highest * (1 + monitorError)));
  }

  private List<Long> cuts(long surgeNanos, long longest) {
    List<Long> moments = new ArrayList<>(List.of(0L));
    long at = 0;
    while (at < offNanos) {
      long next = offNanos - at > longest ? at + longest : offNanos;
      at = surgeNanos > at && surgeNanos < next ? surgeNanos : next;
      moments.add(at);
    }
    return moments;
  }

  private double mean(long fromNanos, long toNanos) {
    return current.mean(firstSeconds + fromNanos * NANO, firstSeconds + toNanos * NANO);
  }
}
