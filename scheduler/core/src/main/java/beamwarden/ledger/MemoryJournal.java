package beamwarden.ledger;

import java.time.Instant;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.Function;

/**
 * Books that are forgotten with the process: for rehearsals and simulated nights.
 *
 * <p>Keeps the rules of a durable journal, fence and chains included; an entry's body is the text
 * of its record. Can be told to fail as a disk would, and to be {@linkplain #reopened() reopened}
 * as after a crash. Owned by one thread.
 */
public final class MemoryJournal implements Journal {
  /**
   * How a commit fails. The caller sees the same in both cases, and must not know the difference.
   */
  public enum Failure {
    /** Nothing was stored. */
    BEFORE_STORING,
    /** Everything was stored, but the caller is not told. */
    AFTER_STORING
  }

  private static final int FORMAT = 1;

  private final Contents contents;
  private final Function<List<Entry>, Optional<Failure>> failures;
  private String closedBecause = "";

  /** Empty books that never fail. */
  public MemoryJournal(String store) {
    this(store, entries -> Optional.empty());
  }

  /**
   * Empty books that fail when told to.
   *
   * @param store the store's id
   * @param failures asked before each commit whether, and how, it fails
   */
  public MemoryJournal(String store, Function<List<Entry>, Optional<Failure>> failures) {
    this(new Contents(store), failures);
  }

  private MemoryJournal(Contents contents, Function<List<Entry>, Optional<Failure>> failures) {
    this.contents = contents;
    this.failures = failures;
  }

  /** The same books opened once more, as after a crash; this one must not be used any longer. */
  public MemoryJournal reopened() {
    return new MemoryJournal(contents, failures);
  }

  @Override
  public String store() {
    return contents.store;
  }

  @Override
  public List<Recorded> read() {
    return List.copyOf(contents.entries);
  }

  @Override
  public long raiseFence(String instrument, Instant at) {
    refuseWhenClosed();
    long fence = contents.fences.values().stream().mapToLong(Long::longValue).max().orElse(0) + 1;
    contents.fences.put(instrument, fence);
    contents.add(fence, at, new Entry.FenceRaised(fence, instrument));
    return fence;
  }

  @Override
  public List<Recorded> commit(long fence, Instant at, List<Entry> entries) {
    refuseWhenClosed();
    if (entries.isEmpty()) {
      throw new IllegalArgumentException("a commit needs at least one entry");
    }
    if (!contents.fences.containsValue(fence)) {
      throw failed("the fence " + fence + " does not hold any longer: another daemon took over");
    }
    Optional<Failure> failure = failures.apply(entries);
    if (failure.equals(Optional.of(Failure.BEFORE_STORING))) {
      throw failed("the commit failed, as it was told to");
    }
    List<Recorded> stored = entries.stream().map(each -> contents.add(fence, at, each)).toList();
    if (failure.isPresent()) {
      throw failed("the commit failed, as it was told to");
    }
    return stored;
  }

  private void refuseWhenClosed() {
    if (!closedBecause.isEmpty()) {
      throw new JournalException("the journal takes no more entries: " + closedBecause);
    }
  }

  private JournalException failed(String because) {
    closedBecause = because;
    return new JournalException(because);
  }

  @Override
  public void close() {
    closedBecause = "it was closed";
  }

  /** What outlives a crash. */
  private static final class Contents {
    private final String store;
    private final List<Recorded> entries = new ArrayList<>();
    private final Map<String, Long> fences = new HashMap<>();
    private final Map<String, String> heads = new HashMap<>();

    Contents(String store) {
      this.store = store;
    }

    Recorded add(long fence, Instant at, Entry entry) {
      String chain = entry.chain();
      String previous = heads.computeIfAbsent(chain, name -> ChainHash.genesis(store, name));
      long number = entries.size() + 1L;
      String hash =
          ChainHash.entry(
              previous,
              number,
              at.toString(),
              fence,
              chain,
              entry.getClass().getSimpleName(),
              FORMAT,
              entry.toString());
      Recorded recorded = new Recorded(number, at, fence, entry, hash);
      entries.add(recorded);
      heads.put(chain, hash);
      return recorded;
    }
  }
}
