package beamwarden.system;

import beamwarden.beam.Conditions;
import beamwarden.beam.Point;
import beamwarden.instrument.Grant;
import beamwarden.instrument.Instrument;
import beamwarden.instrument.InstrumentListener;
import beamwarden.instrument.StopWhen;
import beamwarden.simulated.SimulatedInstrument;
import java.util.Set;
import java.util.function.Supplier;

/**
 * An instrument whose adapter is started anew when it has died, as a supervisor would: the same
 * hardware, the same notes. Each verb can be the last one a daemon ever calls.
 */
final class RestartableInstrument implements Instrument {
  private final Supplier<SimulatedInstrument> adapters;
  private final Runnable beforeVerb;
  private SimulatedInstrument adapter;

  /**
   * Such an instrument.
   *
   * @param adapters makes an adapter over the same hardware and notes
   * @param beforeVerb runs before each verb, and may throw to kill the daemon there
   */
  RestartableInstrument(Supplier<SimulatedInstrument> adapters, Runnable beforeVerb) {
    this.adapters = adapters;
    this.beforeVerb = beforeVerb;
    this.adapter = adapters.get();
  }

  @Override
  public void connect(InstrumentListener listener) {
    beforeVerb.run();
    if (adapter.hasEnded()) {
      adapter = adapters.get();
    }
    adapter.connect(listener);
  }

  @Override
  public void seal(long fence, String store, Set<Long> grants, boolean handOver) {
    beforeVerb.run();
    adapter.seal(fence, store, grants, handOver);
  }

  @Override
  public void prepare(long request, Conditions conditions, Point stage) {
    beforeVerb.run();
    adapter.prepare(request, conditions, stage);
  }

  @Override
  public void measure(long request) {
    beforeVerb.run();
    adapter.measure(request);
  }

  @Override
  public void begin(Grant grant) {
    beforeVerb.run();
    adapter.begin(grant);
  }

  @Override
  public void stop(StopWhen when) {
    beforeVerb.run();
    adapter.stop(when);
  }

  @Override
  public void heartbeat(long number) {
    beforeVerb.run();
    adapter.heartbeat(number);
  }

  @Override
  public void acknowledge(long grant) {
    beforeVerb.run();
    adapter.acknowledge(grant);
  }

  @Override
  public void windDown() {
    beforeVerb.run();
    adapter.windDown();
  }

  @Override
  public void close() {
    adapter.close();
  }
}
