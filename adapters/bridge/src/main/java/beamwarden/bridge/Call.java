package beamwarden.bridge;

import beamwarden.beam.Conditions;
import beamwarden.beam.Point;
import beamwarden.instrument.Grant;
import beamwarden.instrument.Instrument;
import beamwarden.instrument.StopWhen;
import java.util.Collection;
import java.util.Collections;
import java.util.Optional;
import java.util.SortedSet;
import java.util.TreeSet;

/**
 * What a daemon may ask of an adapter: the methods of the requests, each with its parameters.
 *
 * <p>All but {@link Hello}, {@link Connect} and {@link Bye} are the verbs of {@link Instrument}.
 */
sealed interface Call {
  /**
   * The first request of a connection.
   *
   * @param protocol which version of these messages the daemon speaks
   * @param token proof that the daemon may read the adapter's address file; none over streams
   */
  record Hello(int protocol, Optional<String> token) implements Call {}

  /** Asks for events, from the connected instrument on. */
  record Connect() implements Call {}

  /** The daemon ends in order: blank the beam, let go of the instrument, then end. */
  record Bye() implements Call {}

  /** A call that is carried out by a verb of the instrument. */
  sealed interface OfInstrument extends Call {
    /** Calls the verb. */
    void applyTo(Instrument instrument);
  }

  record Seal(long fence, String store, SortedSet<Long> grants, boolean handOver)
      implements OfInstrument {
    public Seal {
      grants = Collections.unmodifiableSortedSet(new TreeSet<>(grants));
    }

    static Seal of(long fence, String store, Collection<Long> grants, boolean handOver) {
      return new Seal(fence, store, new TreeSet<>(grants), handOver);
    }

    @Override
    public void applyTo(Instrument instrument) {
      instrument.seal(fence, store, grants, handOver);
    }
  }

  record Prepare(long request, Conditions conditions, Point stage) implements OfInstrument {
    @Override
    public void applyTo(Instrument instrument) {
      instrument.prepare(request, conditions, stage);
    }
  }

  record Measure(long request) implements OfInstrument {
    @Override
    public void applyTo(Instrument instrument) {
      instrument.measure(request);
    }
  }

  record Begin(Grant grant) implements OfInstrument {
    @Override
    public void applyTo(Instrument instrument) {
      instrument.begin(grant);
    }
  }

  record Stop(StopWhen when) implements OfInstrument {
    @Override
    public void applyTo(Instrument instrument) {
      instrument.stop(when);
    }
  }

  record Heartbeat(long number) implements OfInstrument {
    @Override
    public void applyTo(Instrument instrument) {
      instrument.heartbeat(number);
    }
  }

  record Acknowledge(long grant) implements OfInstrument {
    @Override
    public void applyTo(Instrument instrument) {
      instrument.acknowledge(grant);
    }
  }

  record WindDown() implements OfInstrument {
    @Override
    public void applyTo(Instrument instrument) {
      instrument.windDown();
    }
  }
}
