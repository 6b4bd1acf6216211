package beamwarden.kit;

import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.Receipt;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;

/** What no order of events may show, whatever is tested. */
final class EventOrder {
  private final Set<Long> begun = new HashSet<>();
  private final Set<Long> refused = new HashSet<>();
  private final Map<Long, Receipt> ended = new HashMap<>();
  private final Map<Long, Long> units = new HashMap<>();

  private EventOrder() {}

  /** What is wrong with this order, as one sentence. */
  static Optional<String> broken(List<? extends InstrumentEvent> events) {
    EventOrder order = new EventOrder();
    return events.stream().map(order::step).flatMap(Optional::stream).findFirst();
  }

  private Optional<String> step(InstrumentEvent event) {
    if (event instanceof InstrumentEvent.Begun e) {
      return begun(e.grant());
    }
    if (event instanceof InstrumentEvent.NotBegun e) {
      refused.add(e.grant());
      return wrongWhen(
          begun.contains(e.grant()), "grant " + e.grant() + " was refused after it had begun");
    }
    if (event instanceof InstrumentEvent.Progress e) {
      return progress(e);
    }
    if (event instanceof InstrumentEvent.Ended e) {
      return ended(e.receipt());
    }
    return Optional.empty();
  }

  private Optional<String> begun(long grant) {
    if (refused.contains(grant)) {
      return Optional.of("grant " + grant + " began after it had been refused");
    }
    return wrongWhen(!begun.add(grant), "grant " + grant + " began twice");
  }

  private Optional<String> progress(InstrumentEvent.Progress e) {
    if (!begun.contains(e.grant()) || ended.containsKey(e.grant())) {
      return Optional.of("grant " + e.grant() + " showed progress while it was not exposing");
    }
    Long before = units.put(e.grant(), e.unitsDone());
    return wrongWhen(
        before != null && before > e.unitsDone(),
        "grant " + e.grant() + " went back from " + before + " to " + e.unitsDone() + " units");
  }

  private Optional<String> ended(Receipt receipt) {
    long grant = receipt.grant();
    if (!begun.contains(grant)) {
      return Optional.of("grant " + grant + " ended and had not begun");
    }
    Receipt before = ended.put(grant, receipt);
    return wrongWhen(
        before != null && !before.equals(receipt), "grant " + grant + " ended with two receipts");
  }

  private static Optional<String> wrongWhen(boolean wrong, String what) {
    return wrong ? Optional.of(what) : Optional.empty();
  }
}
