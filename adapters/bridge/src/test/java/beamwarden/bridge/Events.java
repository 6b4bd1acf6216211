package beamwarden.bridge;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;
import static org.junit.jupiter.api.Assertions.assertNotNull;

import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.InstrumentListener;
import java.util.concurrent.BlockingQueue;
import java.util.concurrent.LinkedBlockingQueue;
import java.util.concurrent.TimeUnit;

/** A listener that keeps what it is told. */
final class Events implements InstrumentListener {
  private static final long SECONDS = 10;

  private final BlockingQueue<InstrumentEvent> told = new LinkedBlockingQueue<>();

  @Override
  public void on(InstrumentEvent event) {
    told.add(event);
  }

  /** The next event, waited for. */
  InstrumentEvent next() throws InterruptedException {
    InstrumentEvent event = told.poll(SECONDS, TimeUnit.SECONDS);
    assertNotNull(event, "no event within " + SECONDS + " s");
    return event;
  }

  /** Waits for the next event, which must be of that type. */
  <T extends InstrumentEvent> T next(Class<T> type) throws InterruptedException {
    return assertInstanceOf(type, next());
  }

  /** Waits for the end of the connection, the next event; why it ended. */
  String lost() throws InterruptedException {
    return next(InstrumentEvent.Lost.class).reason();
  }

  /** Makes sure that nothing more was told. */
  void nothingMore() {
    assertEquals(0, told.size(), told::toString);
  }
}
