package beamwarden.simulated;

import beamwarden.instrument.Receipt;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeMap;
import java.util.TreeSet;

/**
 * The adapter's durable notes: the fence and the store to which it is bound, which grants began,
 * which never will, and the receipts that nobody has acknowledged yet.
 *
 * <p>What a method notes is kept when the method returns. Each store has notes of its own, because
 * two stores may use the same grant numbers. Guarded by the hardware's lock.
 */
public final class Notes {
  private final Map<String, OfStore> stores = new HashMap<>();
  private final Optional<DurableFile> file;
  private long fence;
  private String store = "";

  private Notes(Optional<DurableFile> file) {
    this.file = file;
  }

  /** Notes in memory: they outlive the adapter object and nothing else. */
  public static Notes inMemory() {
    return new Notes(Optional.empty());
  }

  /**
   * Notes in a file, each forced to disk. The file is rewritten in short form when it is opened.
   *
   * @throws IllegalArgumentException when a line other than a torn last one is damaged
   */
  static Notes in(Path path) {
    DurableFile file = new DurableFile(path);
    Notes notes = new Notes(Optional.of(file));
    for (String line : file.lines()) {
      notes.apply(Words.of(line));
    }
    file.replace(notes.shortForm());
    return notes;
  }

  long fence() {
    return fence;
  }

  /** The store to which the adapter is bound; empty before the first seal. */
  String store() {
    return store;
  }

  /** Whether the store has ever sealed this adapter. */
  boolean knows(String other) {
    return stores.containsKey(other);
  }

  /** Raises the fence, binds to the store, and forbids some grants for good, in one note. */
  void seal(long newFence, String newStore, Set<Long> forbidden) {
    List<Object> words = new ArrayList<>(List.of("seal", newFence, newStore));
    words.addAll(forbidden);
    note(words);
  }

  void begun(long grant) {
    note(List.of("begun", grant, grant));
  }

  /** The highest number of a grant of the present store that ever began; 0 when none did. */
  long lastBegun() {
    return bound().begun.isEmpty() ? 0 : bound().begun.last();
  }

  boolean hasBegun(long grant) {
    return bound().begun.contains(grant);
  }

  boolean isForbidden(long grant) {
    return bound().forbidden.contains(grant);
  }

  void keep(Receipt receipt) {
    List<Object> words = new ArrayList<>(List.of("kept"));
    words.addAll(ReceiptWords.of(receipt));
    note(words);
  }

  Optional<Receipt> kept(long grant) {
    return Optional.ofNullable(bound().kept.get(grant));
  }

  void forget(long grant) {
    if (kept(grant).isPresent()) {
      note(List.of("forget", grant));
    }
  }

  private OfStore bound() {
    return stores.getOrDefault(store, new OfStore());
  }

  /** First on disk, then in mind: a note that cannot be written has not been made. */
  private void note(List<?> words) {
    file.ifPresent(kept -> kept.append(List.of(Words.line(words))));
    apply(Words.written(words));
  }

  private void apply(Words words) {
    String kind = words.text();
    switch (kind) {
      case "seal" -> applySeal(words);
      case "begun" -> {
        long last = words.whole();
        for (long grant = last, first = words.whole(); grant >= first; grant--) {
          bound().begun.add(grant);
        }
      }
      case "kept" -> {
        Receipt receipt = ReceiptWords.read(words);
        bound().kept.put(receipt.grant(), receipt);
      }
      case "forget" -> bound().kept.remove(words.whole());
      default ->
          throw new IllegalArgumentException(
              "the adapter's notes hold a line of an unknown kind: " + kind);
    }
  }

  /** A higher fence forbids everything before it, so that the numbers need not be kept. */
  private void applySeal(Words words) {
    long newFence = words.whole();
    store = words.text();
    OfStore notes = stores.computeIfAbsent(store, unseen -> new OfStore());
    if (newFence > fence) {
      notes.forbidden.clear();
    }
    fence = newFence;
    while (words.more()) {
      notes.forbidden.add(words.whole());
    }
  }

  /** Lines that say all of it; the bound store comes last. */
  private List<String> shortForm() {
    List<String> lines = new ArrayList<>();
    stores.keySet().stream()
        .filter(name -> !name.equals(store))
        .forEach(name -> lines.addAll(lines(name, 0)));
    if (!store.isEmpty()) {
      lines.addAll(lines(store, fence));
    }
    return lines;
  }

  private List<String> lines(String name, long withFence) {
    OfStore notes = stores.get(name);
    List<String> lines = new ArrayList<>();
    List<Object> seal = new ArrayList<>(List.of("seal", withFence, name));
    seal.addAll(notes.forbidden);
    lines.add(Words.line(seal));
    notes.ranges().forEach((first, last) -> lines.add(Words.line(List.of("begun", last, first))));
    for (Receipt receipt : notes.kept.values()) {
      List<Object> kept = new ArrayList<>(List.of("kept"));
      kept.addAll(ReceiptWords.of(receipt));
      lines.add(Words.line(kept));
    }
    return lines;
  }

  /** What is noted for one store. */
  private static final class OfStore {
    final TreeSet<Long> begun = new TreeSet<>();
    final TreeSet<Long> forbidden = new TreeSet<>();
    final Map<Long, Receipt> kept = new TreeMap<>();

    /** Unbroken ranges of begun grants, the last number by the first. */
    Map<Long, Long> ranges() {
      Map<Long, Long> ranges = new TreeMap<>();
      long first = 0;
      long last = -1;
      for (long grant : begun) {
        first = grant == last + 1 && !ranges.isEmpty() ? first : grant;
        last = grant;
        ranges.put(first, last);
      }
      return ranges;
    }
  }
}
