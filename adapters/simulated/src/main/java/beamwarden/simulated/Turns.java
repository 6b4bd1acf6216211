package beamwarden.simulated;

import java.util.ArrayDeque;
import java.util.Deque;
import java.util.List;
import java.util.Optional;

/** Orders, one at a time, in the order in which they came. */
final class Turns {
  private final Deque<Order> waiting = new ArrayDeque<>();
  private Optional<Order> current = Optional.empty();

  void add(Order order) {
    waiting.add(order);
    next();
  }

  /** The grant whose turn it is. */
  Optional<Exposing> exposing() {
    return current.filter(Exposing.class::isInstance).map(Exposing.class::cast);
  }

  /** Whether a grant has its turn or waits for it. */
  boolean holds(long grant) {
    return exposing().filter(one -> one.grant().number() == grant).isPresent()
        || waitingGrants().stream().anyMatch(one -> one.grant().number() == grant);
  }

  /** Takes out the grants that have not had their turn. */
  List<Exposing> dropGrants() {
    List<Exposing> dropped = waitingGrants();
    waiting.removeAll(dropped);
    return dropped;
  }

  /** Takes out everything that has not had its turn. */
  void dropAll() {
    waiting.clear();
  }

  private List<Exposing> waitingGrants() {
    return waiting.stream().filter(Exposing.class::isInstance).map(Exposing.class::cast).toList();
  }

  private void next() {
    while (current.isEmpty() && !waiting.isEmpty()) {
      Order order = waiting.remove();
      current = Optional.of(order);
      order.start(() -> finished(order));
    }
  }

  private void finished(Order order) {
    if (current.filter(one -> one == order).isPresent()) {
      current = Optional.empty();
      next();
    }
  }
}
