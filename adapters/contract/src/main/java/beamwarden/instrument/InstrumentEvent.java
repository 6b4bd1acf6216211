package beamwarden.instrument;

import beamwarden.beam.Conditions;
import beamwarden.beam.Point;

/** What an adapter tells, in the order in which it happened. */
public sealed interface InstrumentEvent {
  /**
   * The answer to {@code connect}.
   *
   * @param abilities what the instrument can do
   * @param session the chamber session: another id after a vent, an opened door or a re-homed stage
   * @param readings its condition
   */
  record Connected(Abilities abilities, String session, Readings readings)
      implements InstrumentEvent {}

  /**
   * The connection is gone; what runs at the instrument goes on until its grant or lease ends.
   *
   * @param reason one sentence for a person
   */
  record Lost(String reason) implements InstrumentEvent {}

  /**
   * The answer to {@code seal}.
   *
   * @param report what the adapter can prove
   */
  record Sealed(SealReport report) implements InstrumentEvent {}

  /**
   * The adapter will not be sealed by this store: its fence is higher, or it is bound to another
   * store.
   *
   * @param fence the adapter's fence
   * @param store the store to which it is bound
   */
  record SealRefused(long fence, String store) implements InstrumentEvent {}

  /**
   * The conditions were reached.
   *
   * @param request the number of the request
   * @param conditions as read back from the instrument, never echoed
   * @param stage as read back
   */
  record Prepared(long request, Conditions conditions, Point stage) implements InstrumentEvent {}

  /**
   * The conditions were not reached.
   *
   * @param request the number of the request
   * @param fault why not
   */
  record NotPrepared(long request, Fault fault) implements InstrumentEvent {}

  /**
   * The answer to {@code measure}.
   *
   * @param request the number of the request
   * @param reading what the meter showed
   */
  record Measured(long request, CurrentReading reading) implements InstrumentEvent {}

  /**
   * The current could not be measured.
   *
   * @param request the number of the request
   * @param fault why not
   */
  record NotMeasured(long request, Fault fault) implements InstrumentEvent {}

  /**
   * An exposure has been noted durably and the beam is about to come on.
   *
   * @param grant the grant's number
   */
  record Begun(long grant) implements InstrumentEvent {}

  /**
   * A grant was refused before any electron was sent, for good.
   *
   * @param grant the grant's number
   * @param fault why
   */
  record NotBegun(long grant, Fault fault) implements InstrumentEvent {}

  /**
   * How far an exposure is.
   *
   * @param grant the grant's number
   * @param unitsDone units done so far
   */
  record Progress(long grant, long unitsDone) implements InstrumentEvent {}

  /**
   * An exposure has ended and the beam is blanked.
   *
   * @param receipt what was done
   */
  record Ended(Receipt receipt) implements InstrumentEvent {}

  /**
   * The answer to a heartbeat.
   *
   * @param number the heartbeat's number
   */
  record HeartbeatSeen(long number) implements InstrumentEvent {}

  /**
   * The answer to {@code windDown}.
   *
   * @param readings as read back
   */
  record WoundDown(Readings readings) implements InstrumentEvent {}

  /**
   * Something went wrong that is not the answer to a request. The beam is blanked.
   *
   * @param fault what it was
   */
  record Trouble(Fault fault) implements InstrumentEvent {}
}
