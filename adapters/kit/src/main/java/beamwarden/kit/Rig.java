package beamwarden.kit;

import beamwarden.beam.BeamSettings;
import beamwarden.beam.Placement;
import beamwarden.beam.Point;
import beamwarden.beam.Rectangle;
import beamwarden.instrument.Abilities;
import beamwarden.instrument.DataFile;
import beamwarden.instrument.Instrument;
import java.nio.file.Path;
import java.time.Duration;
import java.util.List;
import java.util.Optional;

/**
 * What an author supplies to make his adapter testable: the adapter, ground that may be spent, and
 * a hand on the instrument from outside.
 *
 * <p>A rig begins with an adapter that has no notes: no fence, no store, no receipts. Its methods
 * are called from one thread.
 */
public interface Rig extends AutoCloseable {
  /** The adapter; another object after {@link #restart()}. */
  Instrument instrument();

  /** What the instrument can do: what a profile would say, and {@code Connected} answers. */
  Abilities abilities();

  /** How time passes where the adapter lives. */
  Passage time();

  /**
   * The suite's unit of time: on the adapter's own line, the time in which it surely answers a verb
   * that needs no beam, and in which it turns the beam off. Exposures last up to 80 of them.
   */
  Duration beat();

  /** The longest time that connecting, preparing, measuring or winding down can take. */
  default Duration patience() {
    return Duration.ofMinutes(30);
  }

  /** The column's settings for every exposure of the suite. */
  BeamSettings settings();

  /** Where the sample sits. */
  Placement placement();

  /** The part of the sample that the suite may spend, within the field of every mode. */
  default Rectangle ground() {
    return Rectangle.of(new Point(0, 0), 10e-6, 10e-6);
  }

  /**
   * Ends the adapter's process without warning, unless it has ended, and starts another one on the
   * same durable notes. The new one is not connected yet.
   */
  void restart();

  /**
   * Ends the adapter in order, as its host does when the machine shuts down; another way than
   * {@link Instrument#close} where there is one (a termination signal to its process).
   */
  default void endInOrder() {
    instrument().close();
  }

  /**
   * Opens the chamber's door and closes it again.
   *
   * <p>The suite {@linkplain #restart() restarts} the adapter after each provocation, so that a rig
   * may as well hand a fault over at that start.
   */
  Provocation doorOpens();

  /**
   * Sees to it that during the exposure that begins next, at its middle or before, the current
   * rises well above what a grant allows.
   */
  Provocation currentRises();

  /**
   * Sees to it that during the exposure that begins next, at its middle or before, the connection
   * to the adapter breaks. The adapter lives on, and {@code connect} brings the connection back.
   */
  Provocation connectionBreaks();

  /**
   * The stretches of beam that have ended so far, from a record that does not come from the
   * adapter: a current meter's log, or a simulation's own book. Empty when there is none.
   */
  Optional<List<Stretch>> truth();

  /** Where a data file that a receipt names can be read. */
  default Path data(DataFile file) {
    return Path.of(file.path());
  }

  /** Ends the adapter and whatever the rig has started, and removes what it wrote. */
  @Override
  void close();
}
