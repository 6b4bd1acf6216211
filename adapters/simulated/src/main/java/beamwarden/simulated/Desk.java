package beamwarden.simulated;

import beamwarden.instrument.Fault;
import beamwarden.instrument.InstrumentEvent;
import java.time.Duration;
import java.util.Optional;
import java.util.function.Consumer;

/** What an order needs of the adapter that carries it out. */
interface Desk {
  Hardware hardware();

  Notes notes();

  Heartbeats heartbeats();

  Detector detector();

  /** Tells the listener. */
  void say(InstrumentEvent event);

  /** Forbids a grant for good, and says so. */
  void refuse(long grant, Fault fault);

  /** Tells the listener of this connection only. */
  Consumer<InstrumentEvent> answer();

  /** Runs a task later, unless the adapter has ended by then. */
  void later(Duration delay, Runnable task);

  /**
   * Lets the fault plan strike at a step. What it did is answered; after it the adapter may have
   * {@linkplain #hasEnded() ended}.
   */
  Optional<FaultPlan.Strike> strike(FaultPlan.Step step);

  /** Lets something go wrong now. */
  void happen(Mishap mishap);

  /** Whether the adapter's process is gone. */
  boolean hasEnded();
}
