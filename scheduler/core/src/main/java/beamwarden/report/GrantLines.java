package beamwarden.report;

import beamwarden.ledger.Entry;
import beamwarden.ledger.GrantState;
import beamwarden.ledger.Recorded;
import java.time.Instant;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.UnaryOperator;

/** Takes entries together, grant by grant, in the order in which the grants were stored. */
final class GrantLines {
  private final Map<Long, GrantLine> byNumber = new LinkedHashMap<>();

  private GrantLines() {}

  static Collection<GrantLine> of(List<Recorded> entries) {
    GrantLines lines = new GrantLines();
    entries.forEach(recorded -> lines.take(recorded.entry(), recorded.at()));
    return lines.byNumber.values();
  }

  private void take(Entry entry, Instant at) {
    if (entry instanceof Entry.GrantOpened opened) {
      byNumber.put(
          opened.grant(),
          new GrantLine(opened.inFull(), GrantState.OPEN, at, "", Optional.empty()));
    } else if (entry instanceof Entry.GrantBooked booked) {
      change(booked.delivered().grant(), line -> line.booked(booked.delivered(), booked.receipt()));
    } else if (entry instanceof Entry.GrantPresumed presumed) {
      change(
          presumed.atMost().grant(),
          line -> line.presumed(presumed.atMost(), presumed.because(), presumed.receipt()));
    } else if (entry instanceof Entry.GrantVoided voided) {
      change(voided.grant(), line -> line.unused(voided.because()));
    }
  }

  private void change(long grant, UnaryOperator<GrantLine> how) {
    byNumber.computeIfPresent(grant, (number, line) -> how.apply(line));
  }
}
