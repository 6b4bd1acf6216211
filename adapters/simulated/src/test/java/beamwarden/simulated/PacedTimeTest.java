package beamwarden.simulated;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.Exposure;
import beamwarden.beam.Placement;
import beamwarden.beam.SpotScan;
import beamwarden.instrument.Grant;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.Receipt;
import beamwarden.timing.PacedTime;
import beamwarden.timing.TimeAnchor;
import java.time.Duration;
import java.time.Instant;
import java.util.Set;
import java.util.concurrent.BlockingQueue;
import java.util.concurrent.LinkedBlockingQueue;
import java.util.concurrent.TimeUnit;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Test;

/**
 * On a line of time that runs by itself, at a high pace: tasks run late, the scan engine does not.
 */
class PacedTimeTest {
  private static final double PACE = 2_000;
  private static final long PATIENCE_SECONDS = 30;

  private final PacedTime time =
      new PacedTime(new TimeAnchor(Session.EVENING, Instant.now(), PACE), "simulated-test");
  private final MemoryRecord truth = DeliveredRecord.inMemory();
  private final BlockingQueue<InstrumentEvent> heard = new LinkedBlockingQueue<>();
  private final SimulatedInstrument instrument =
      new SimulatedInstrument(
          Hardware.inMemory(Lab.abilities(), Simulation.inMemory(1).withoutNoise(), time, truth),
          Notes.inMemory());

  @AfterEach
  void end() {
    instrument.close();
    time.close();
  }

  @Test
  void deliversExactlyTheScanThoughTasksRunLate() {
    begin(grant(connected(), Duration.ofHours(10)));
    Receipt receipt = await(InstrumentEvent.Ended.class).receipt();
    assertEquals(Duration.ofMinutes(10), receipt.beamOn());
    assertEquals(15e-12 * 600 / 1.602176634e-19, truth.stretches().get(0).electrons(), 1);
  }

  @Test
  void blanksWhenTheLeaseEndsAndNotWhenItsTaskRuns() {
    begin(grant(connected(), Duration.ofMinutes(5)));
    Receipt receipt = await(InstrumentEvent.Ended.class).receipt();
    assertTrue(receipt.beamOn().compareTo(Duration.ofMinutes(5)) <= 0, receipt::toString);
    assertTrue(receipt.fault().isPresent());
  }

  private String connected() {
    instrument.connect(heard::add);
    String session = await(InstrumentEvent.Connected.class).session();
    instrument.seal(1, Session.STORE, Set.of(), false);
    await(InstrumentEvent.Sealed.class);
    instrument.prepare(1, Lab.COUNTING, Lab.MIDDLE);
    await(InstrumentEvent.Prepared.class);
    return session;
  }

  private void begin(Grant grant) {
    instrument.heartbeat(1);
    instrument.begin(grant);
  }

  private static Grant grant(String session, Duration lease) {
    SpotScan scan = new SpotScan(Lab.MIDDLE, Duration.ofMinutes(10));
    Exposure exposure =
        new Exposure("emitter", 0, "abs-3", new Placement(Lab.MIDDLE, 0, 3e-6), Lab.COUNTING, scan);
    return new Grant(
        1,
        Session.STORE,
        1,
        session,
        exposure,
        Duration.ofMinutes(11),
        Session.highest(Lab.COUNTING),
        1,
        Duration.ofHours(1),
        lease,
        "head");
  }

  private <E extends InstrumentEvent> E await(Class<E> kind) {
    try {
      while (true) {
        InstrumentEvent event = heard.poll(PATIENCE_SECONDS, TimeUnit.SECONDS);
        if (event == null) {
          throw new AssertionError("no " + kind.getSimpleName() + " came");
        }
        if (kind.isInstance(event)) {
          return kind.cast(event);
        }
      }
    } catch (InterruptedException interrupted) {
      Thread.currentThread().interrupt();
      throw new AssertionError(interrupted);
    }
  }
}
