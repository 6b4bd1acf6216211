package beamwarden.run;

import beamwarden.ledger.Recorded;
import java.time.Instant;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.CompletableFuture;

/**
 * Where people and programs turn to a run that is under way. Safe for use by several threads.
 *
 * <p>Nothing here touches the run itself: a wish is queued to the engine's thread, and what is read
 * is the state after the last step.
 */
public interface Desk {
  /**
   * Asks for something.
   *
   * @return completes when it was done and is on disk, with an empty refusal, or with one sentence
   *     that says why it was not done
   */
  CompletableFuture<Optional<String>> ask(Event.Wish wish);

  /** The state after the last step. */
  RunState state();

  /** What does not change while the run lasts. */
  RunSetup setup();

  /** The present moment on the run's line of time. */
  Instant now();

  /** The recorded entries with a number above {@code number}, in order, at most {@code most}. */
  List<Recorded> entriesAfter(long number, int most);

  /** Calls {@code listener} after every step that recorded something; it must return at once. */
  AutoCloseable onRecorded(Runnable listener);
}
