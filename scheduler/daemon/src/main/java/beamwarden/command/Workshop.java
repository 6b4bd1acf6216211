package beamwarden.command;

import beamwarden.ledger.Recorded;
import beamwarden.profile.Profile;
import beamwarden.queue.Queue;
import java.net.URI;
import java.nio.file.Path;
import java.time.Instant;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalLong;

/**
 * What commands need that takes the program's parts put together; found through {@link
 * java.util.ServiceLoader}.
 */
public interface Workshop {
  /**
   * The present moment: on a store's own line of time when it has one, else the machine's.
   *
   * @throws WorkshopException when the store cannot be read
   */
  Instant now(Optional<Path> store);

  /**
   * Reads a store in which no daemon is at work, and writes nothing.
   *
   * @throws WorkshopException when there is none, or it cannot be read
   */
  Shelf shelf(Path store);

  /**
   * Runs a queue in virtual time on the simulated instrument.
   *
   * @throws WorkshopException when it cannot be done
   */
  Rehearsed rehearse(RehearsalAsked asked);

  /**
   * Starts a daemon; returns once it answers and its address is in the store's folder.
   *
   * @throws WorkshopException when it cannot be started
   */
  Serving serve(ServeAsked asked);

  /**
   * A store as it stands.
   *
   * @param profile the profile under which it was last served
   * @param entries its entries
   */
  record Shelf(Profile profile, List<Recorded> entries) {
    /** Copies the entries. */
    public Shelf {
      entries = List.copyOf(entries);
    }
  }

  /**
   * What is rehearsed.
   *
   * @param queue the queue
   * @param profile the instrument profile
   * @param known entries of a store with which to begin; may be empty
   * @param from when it begins
   * @param seed the seed of the simulated instrument
   * @param noise whether there is any chance at all
   */
  record RehearsalAsked(
      Queue queue, Profile profile, List<Recorded> known, Instant from, long seed, boolean noise) {
    /** Copies the entries. */
    public RehearsalAsked {
      known = List.copyOf(known);
    }
  }

  /**
   * How a rehearsal went.
   *
   * @param entries everything recorded, what was known before included
   * @param ended when it ended, on its own line of time
   * @param refusal why the queue was not taken, if it was not
   */
  record Rehearsed(List<Recorded> entries, Instant ended, Optional<String> refusal) {
    /** Copies the entries. */
    public Rehearsed {
      entries = List.copyOf(entries);
    }
  }

  /**
   * What is served.
   *
   * @param profile the instrument profile
   * @param document the text of its document, kept with the store; its hash is noted with every
   *     queue
   * @param store the store's folder
   * @param port the port on loopback; 0 for any that is free
   * @param pace how many times faster than real time a new store is to run, if it is
   * @param from when a new store's line of time begins, if not now
   * @param seed the seed of a simulated instrument, if not its own
   */
  record ServeAsked(
      Profile profile,
      String document,
      Path store,
      int port,
      OptionalDouble pace,
      Optional<Instant> from,
      OptionalLong seed) {}

  /** A daemon that answers. */
  interface Serving extends AutoCloseable {
    /** Its address. */
    URI address();

    /**
     * Waits until everything has stopped for good by itself.
     *
     * @return why, in one sentence
     * @throws InterruptedException when the wait is given up
     */
    String awaitHalt() throws InterruptedException;

    /** Takes no more requests, blanks the beam, and lets go of everything, in order. */
    @Override
    void close();
  }
}
