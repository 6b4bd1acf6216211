package beamwarden.bridge;

import beamwarden.beam.Conditions;
import beamwarden.beam.Point;
import beamwarden.instrument.Grant;
import beamwarden.instrument.GrantFate;
import beamwarden.instrument.Instrument;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.InstrumentListener;
import beamwarden.instrument.SealReport;
import beamwarden.instrument.StopWhen;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeMap;
import java.util.concurrent.CopyOnWriteArrayList;

/** An instrument that answers everything at once, and remembers what it was asked. */
final class FakeInstrument implements Instrument {
  /** The grant whose beginning it cannot bear. */
  static final long FATAL_GRANT = 666;

  private final Runnable whenClosed;
  private final List<Object> asked = new CopyOnWriteArrayList<>();
  private volatile InstrumentListener listener = event -> {};
  private volatile boolean closed;

  FakeInstrument() {
    this(() -> {});
  }

  FakeInstrument(Runnable whenClosed) {
    this.whenClosed = whenClosed;
  }

  /** What it was asked so far. */
  List<Object> asked() {
    return List.copyOf(asked);
  }

  boolean closed() {
    return closed;
  }

  /** Tells whoever listens. */
  void tell(InstrumentEvent event) {
    listener.on(event);
  }

  @Override
  public void connect(InstrumentListener newListener) {
    asked.add("connect");
    listener = newListener;
    tell(new InstrumentEvent.Connected(Examples.ABILITIES, Examples.SESSION, Examples.IDLE));
  }

  @Override
  public void seal(long fence, String store, Set<Long> grants, boolean handOver) {
    asked.add(Call.Seal.of(fence, store, grants, handOver));
    Map<Long, GrantFate> fates = new TreeMap<>();
    grants.forEach(grant -> fates.put(grant, new GrantFate.Unknown()));
    tell(new InstrumentEvent.Sealed(new SealReport(fence, store, 0, fates)));
  }

  @Override
  public void prepare(long request, Conditions conditions, Point stage) {
    asked.add(new Call.Prepare(request, conditions, stage));
    tell(new InstrumentEvent.Prepared(request, conditions, stage));
  }

  @Override
  public void measure(long request) {
    asked.add(new Call.Measure(request));
    tell(new InstrumentEvent.Measured(request, Examples.READING));
  }

  @Override
  public void begin(Grant grant) {
    asked.add(new Call.Begin(grant));
    if (grant.number() == FATAL_GRANT) {
      throw new IllegalStateException("the scan generator is on fire");
    }
    tell(new InstrumentEvent.Begun(grant.number()));
  }

  @Override
  public void stop(StopWhen when) {
    asked.add(new Call.Stop(when));
    tell(new InstrumentEvent.Ended(Examples.CUT_SHORT));
  }

  @Override
  public void heartbeat(long number) {
    asked.add(new Call.Heartbeat(number));
    tell(new InstrumentEvent.HeartbeatSeen(number));
  }

  @Override
  public void acknowledge(long grant) {
    asked.add(new Call.Acknowledge(grant));
  }

  @Override
  public void windDown() {
    asked.add(new Call.WindDown());
    tell(new InstrumentEvent.WoundDown(Examples.IDLE));
  }

  @Override
  public void close() {
    asked.add("close");
    closed = true;
    whenClosed.run();
  }
}
