package beamwarden.kit;

import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.InstrumentListener;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.Predicate;

/**
 * Keeps everything an instrument tells, in order, each with the moment at which it was heard. Safe
 * for use by several threads.
 */
public final class Recorder implements InstrumentListener {
  /**
   * An event that was heard.
   *
   * @param at when, on the rig's line of time
   * @param event what
   * @param <E> its kind
   */
  public record Heard<E extends InstrumentEvent>(Instant at, E event) {}

  private final Passage time;
  private final List<Heard<?>> heard = new ArrayList<>();

  /** A recorder that has heard nothing. */
  public Recorder(Passage time) {
    this.time = time;
  }

  @Override
  public synchronized void on(InstrumentEvent event) {
    heard.add(new Heard<>(time.now(), event));
  }

  /** Everything so far. */
  public synchronized List<Heard<?>> heard() {
    return List.copyOf(heard);
  }

  /** How many events have been heard: a mark from which to look on. */
  public synchronized int mark() {
    return heard.size();
  }

  /** The first event of a kind after a mark that is as wished, when it has been heard. */
  public synchronized <E extends InstrumentEvent> Optional<Heard<E>> first(
      int mark, Class<E> kind, Predicate<E> wished) {
    for (Heard<?> one : heard.subList(mark, heard.size())) {
      if (kind.isInstance(one.event()) && wished.test(kind.cast(one.event()))) {
        return Optional.of(new Heard<>(one.at(), kind.cast(one.event())));
      }
    }
    return Optional.empty();
  }

  /**
   * The same, and lets time pass until it is heard; empty when it was not within {@code atMost}.
   */
  public <E extends InstrumentEvent> Optional<Heard<E>> await(
      int mark, Class<E> kind, Predicate<E> wished, Duration atMost) {
    time.until(() -> first(mark, kind, wished).isPresent(), atMost);
    return first(mark, kind, wished);
  }
}
