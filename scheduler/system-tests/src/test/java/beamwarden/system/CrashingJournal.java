package beamwarden.system;

import beamwarden.ledger.Entry;
import beamwarden.ledger.Journal;
import beamwarden.ledger.Recorded;
import java.time.Instant;
import java.util.List;

/** Books whose every operation can be the last thing a daemon ever does, before it or after it. */
final class CrashingJournal implements Journal {
  private final Journal journal;
  private final Runnable beforeOrAfter;

  CrashingJournal(Journal journal, Runnable beforeOrAfter) {
    this.journal = journal;
    this.beforeOrAfter = beforeOrAfter;
  }

  @Override
  public String store() {
    return journal.store();
  }

  @Override
  public List<Recorded> read() {
    return journal.read();
  }

  @Override
  public long raiseFence(String instrument, Instant at) {
    beforeOrAfter.run();
    long fence = journal.raiseFence(instrument, at);
    beforeOrAfter.run();
    return fence;
  }

  @Override
  public List<Recorded> commit(long fence, Instant at, List<Entry> entries) {
    beforeOrAfter.run();
    List<Recorded> recorded = journal.commit(fence, at, entries);
    beforeOrAfter.run();
    return recorded;
  }

  @Override
  public void close() {
    journal.close();
  }
}
