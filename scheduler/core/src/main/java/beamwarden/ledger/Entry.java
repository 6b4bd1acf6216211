package beamwarden.ledger;

import beamwarden.beam.Exposure;
import beamwarden.dose.Delivery;
import beamwarden.dose.Trim;
import beamwarden.instrument.CurrentReading;
import beamwarden.instrument.Receipt;
import beamwarden.queue.HeldFor;
import beamwarden.queue.JobState;
import beamwarden.queue.Queue;
import beamwarden.queue.Sample;
import java.time.Duration;
import java.util.Optional;

/**
 * One line of the books. Entries are only ever added; a correction is a new entry.
 *
 * <p>Entries of one chain are chained by hash: the entries of a sample under its id, everything
 * else under {@link #GENERAL}.
 */
public sealed interface Entry {
  /** The chain of what concerns no single sample. */
  String GENERAL = "";

  /** The chain to which the entry belongs: a sample's id, or {@link #GENERAL}. */
  default String chain() {
    return GENERAL;
  }

  /**
   * A daemon took the instrument: earlier fencing numbers are void.
   *
   * @param fence the new fencing number
   * @param instrument the instrument's name
   */
  record FenceRaised(long fence, String instrument) implements Entry {}

  /**
   * A queue was handed in.
   *
   * @param queue the queue
   * @param profileHash the SHA-256 of the profile against which it was checked
   */
  record QueueSubmitted(Queue queue, String profileHash) implements Entry {}

  /**
   * A sample and the caps that hold for it from here on.
   *
   * @param sample the sample
   * @param because why they changed; empty when it is new or they are tighter
   */
  record SampleDeclared(Sample sample, String because) implements Entry {
    @Override
    public String chain() {
      return sample.id();
    }
  }

  /**
   * A job moved to another state.
   *
   * @param job the job's id
   * @param state the new state
   * @param heldFor what it waits for, when it is held
   * @param because why, in one sentence; may be empty
   */
  record JobChanged(String job, JobState state, Optional<HeldFor> heldFor, String because)
      implements Entry {
    /** Refuses a hold without its kind, and a kind without a hold. */
    public JobChanged {
      if (heldFor.isPresent() != (state == JobState.HELD)) {
        throw new IllegalArgumentException("a held job, and no other, says what it waits for");
      }
    }
  }

  /**
   * A job was cut to what its caps leave room for.
   *
   * @param job the job's id
   * @param to what is left of it
   * @param because what the cap left, in one sentence
   */
  record JobTrimmed(String job, Trim to, String because) implements Entry {}

  /**
   * A fault kept the instrument from being brought to a job's conditions: a try is used up.
   *
   * @param job the job's id
   */
  record JobFaulted(String job) implements Entry {}

  /**
   * A grant was stored; from here on it counts in full.
   *
   * @param inFull what it gives the sample when it is used up
   * @param longestBeamOn the longest beam-on time that it allows
   * @param session the chamber session for which it is meant
   */
  record GrantOpened(Delivery inFull, Duration longestBeamOn, String session) implements Entry {
    /** The grant's number. */
    public long grant() {
      return inFull.grant();
    }

    /** What is exposed. */
    public Exposure exposure() {
      return inFull.exposure();
    }

    @Override
    public String chain() {
      return exposure().sample();
    }
  }

  /**
   * A receipt was booked.
   *
   * @param delivered what it gave the sample, with upper values that the ledger derived
   * @param receipt the receipt, raw
   */
  record GrantBooked(Delivery delivered, Receipt receipt) implements Entry {
    @Override
    public String chain() {
      return delivered.exposure().sample();
    }
  }

  /**
   * A grant was proved never to have been used.
   *
   * @param grant its number
   * @param sample its sample
   * @param faulted whether a fault kept it from being used, which counts towards the retries
   * @param because how it is known
   */
  record GrantVoided(long grant, String sample, boolean faulted, String because) implements Entry {
    @Override
    public String chain() {
      return sample;
    }
  }

  /**
   * The outcome of a grant is not known, or contradicts itself: it stays counted in full, or more.
   *
   * @param atMost what it may have given the sample
   * @param because why it is not known
   * @param receipt the receipt that was not believed, if there was one
   */
  record GrantPresumed(Delivery atMost, String because, Optional<Receipt> receipt)
      implements Entry {
    @Override
    public String chain() {
      return atMost.exposure().sample();
    }
  }

  /**
   * The probe current was measured.
   *
   * @param reading what the meter showed
   */
  record CurrentMeasured(CurrentReading reading) implements Entry {}

  /**
   * A chamber session was seen at the instrument that nobody has confirmed yet, or the first one.
   *
   * @param session its id
   * @param first whether the books knew no session before
   */
  record SessionSeen(String session, boolean first) implements Entry {}

  /**
   * A person loosened something, or confirmed what only a person can see.
   *
   * @param thing what was approved: a job's id, a sample's id, {@code placements}, {@code
   *     hand-over}
   * @param reason why
   */
  record Approved(String thing, String reason) implements Entry {
    /** The name under which holder and placements are confirmed after the chamber was touched. */
    public static final String PLACEMENTS = "placements";

    /** The name under which an instrument bound to another store is taken over. */
    public static final String HAND_OVER = "hand-over";
  }

  /**
   * Something happened in the night that a person should read in the morning.
   *
   * @param what which kind of thing
   * @param text one sentence
   */
  record Noted(What what, String text) implements Entry {
    /** Kinds of things that happen in a night. */
    public enum What {
      /** A shift opened. */
      SHIFT_OPENED,
      /** A shift closed. */
      SHIFT_CLOSED,
      /** The instrument was wound down. */
      WOUND_DOWN,
      /** Something went wrong. */
      FAULT,
      /** The night was stopped, by a fault or a person. */
      STOPPED,
      /** A person let the night go on. */
      GOES_ON
    }
  }
}
