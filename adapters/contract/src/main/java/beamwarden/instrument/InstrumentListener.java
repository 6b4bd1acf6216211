package beamwarden.instrument;

/** Receives what an instrument tells; called on a thread of the adapter's, never for long. */
@FunctionalInterface
public interface InstrumentListener {
  /** Takes one event; returns at once. */
  void on(InstrumentEvent event);
}
