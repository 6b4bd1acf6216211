package beamwarden.web.api;

import beamwarden.run.Desk;
import beamwarden.run.Event;
import java.time.Duration;
import java.util.Optional;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.TimeUnit;
import java.util.concurrent.TimeoutException;

/** Asks the run for changes, and waits until each is on disk, for a bounded time. */
final class Wishes {
  private final Desk desk;
  private final Duration patience;

  Wishes(Desk desk, Duration patience) {
    this.desk = desk;
    this.patience = patience;
  }

  /** Returns once it was done and is on disk; throws what speaks against it. */
  void ask(Event.Wish wish) {
    Optional<String> halted = desk.state().halted();
    if (halted.isPresent()) {
      throw Refusal.of(RefusalKind.UNAVAILABLE, "everything has stopped: " + halted.get());
    }
    answer(wish)
        .ifPresent(
            refusal -> {
              throw Refusal.of(RefusalKind.REFUSED, refusal);
            });
  }

  private Optional<String> answer(Event.Wish wish) {
    try {
      return desk.ask(wish).get(patience.toMillis(), TimeUnit.MILLISECONDS);
    } catch (TimeoutException late) {
      throw Refusal.of(
          RefusalKind.UNAVAILABLE,
          "the change was not on disk within "
              + patience.toSeconds()
              + " s; look whether it was made before asking again");
    } catch (ExecutionException broken) {
      throw new IllegalStateException("a wish could not be taken", broken.getCause());
    } catch (InterruptedException interrupted) {
      Thread.currentThread().interrupt();
      throw Refusal.of(
          RefusalKind.UNAVAILABLE, "the daemon is closing; look whether the change was made");
    }
  }
}
