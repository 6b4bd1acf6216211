package beamwarden.web.stream;

import beamwarden.answer.ProgressAnswer;
import beamwarden.ledger.Recorded;
import beamwarden.run.Desk;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.concurrent.atomic.AtomicInteger;
import java.util.function.Supplier;

/**
 * One who follows the stream. Fed by the pump's thread alone; what is sent may be acknowledged on
 * any.
 *
 * <p>It gets nothing more while something is on its way to it, so one that reads slowly costs no
 * memory: its cursor waits.
 */
final class Follower {
  private static final int BATCH_MAX = 64;

  private final Outlet outlet;
  private final Runnable wake;
  private final Map<String, ProgressAnswer> told = new HashMap<>();
  private final AtomicInteger underway = new AtomicInteger();
  private long cursor;

  Follower(Outlet outlet, long after, Runnable wake) {
    this.outlet = outlet;
    this.cursor = after;
    this.wake = wake;
  }

  /** Hands over what is new, entries first; progress only once it has all entries. */
  void feed(Desk desk, Supplier<List<ProgressAnswer>> progress) {
    if (underway.get() > 0) {
      return;
    }
    List<Recorded> entries = desk.entriesAfter(cursor, BATCH_MAX);
    if (!entries.isEmpty()) {
      cursor = entries.get(entries.size() - 1).number();
      underway.set(entries.size());
      entries.forEach(entry -> outlet.send(Message.of(entry), this::sent));
      return;
    }
    List<ProgressAnswer> changed =
        progress.get().stream().filter(job -> !job.equals(told.get(job.id()))).toList();
    underway.set(changed.size());
    for (ProgressAnswer job : changed) {
      told.put(job.id(), job);
      outlet.send(Message.of(job), this::sent);
    }
  }

  private void sent() {
    if (underway.decrementAndGet() == 0) {
      wake.run();
    }
  }

  void close() {
    outlet.close();
  }
}
