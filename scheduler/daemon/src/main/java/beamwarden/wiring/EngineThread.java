package beamwarden.wiring;

import beamwarden.instrument.Instrument;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.ledger.Journal;
import beamwarden.ledger.Recorded;
import beamwarden.run.Command;
import beamwarden.run.Desk;
import beamwarden.run.Engine;
import beamwarden.run.Event;
import beamwarden.run.Run;
import beamwarden.run.RunSetup;
import beamwarden.run.RunState;
import beamwarden.run.Wake;
import java.time.Instant;
import java.time.InstantSource;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.ConcurrentHashMap;
import java.util.concurrent.CopyOnWriteArrayList;
import java.util.concurrent.LinkedBlockingQueue;
import java.util.concurrent.RejectedExecutionException;
import java.util.concurrent.ThreadPoolExecutor;
import java.util.concurrent.TimeUnit;
import java.util.concurrent.atomic.AtomicLong;
import java.util.function.Consumer;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/**
 * The one thread that owns the engine, and the desk in front of it.
 *
 * <p>Web, clock and instrument hand over and return; what they hand over is worked through in
 * order.
 */
final class EngineThread implements Desk, Engine.Outlet, AutoCloseable {
  private static final Logger LOGGER = LoggerFactory.getLogger(EngineThread.class);

  /** More than this waiting means that the engine hangs; what comes then is refused. */
  private static final int WAITING_MAX = 100_000;

  private static final long CLOSE_SECONDS_MAX = 20;

  private final RunSetup setup;
  private final InstantSource time;
  private final Consumer<List<Wake>> clock;
  private final Consumer<String> onHalt;
  private final ThreadPoolExecutor thread;
  private final Engine engine;
  private final List<Recorded> recorded = new ArrayList<>();
  private final List<Runnable> listeners = new CopyOnWriteArrayList<>();
  private final Map<Long, CompletableFuture<Optional<String>>> askings = new ConcurrentHashMap<>();
  private final List<Command.Answer> answered = new ArrayList<>();
  private final AtomicLong lastAsking = new AtomicLong();
  private volatile RunState state;

  EngineThread(
      RunSetup setup,
      String name,
      Journal journal,
      Instrument instrument,
      InstantSource time,
      Consumer<List<Wake>> clock,
      Consumer<String> onHalt) {
    this.setup = setup;
    this.time = time;
    this.clock = clock;
    this.onHalt = onHalt;
    this.thread =
        new ThreadPoolExecutor(
            1,
            1,
            0,
            TimeUnit.SECONDS,
            new LinkedBlockingQueue<>(WAITING_MAX),
            task -> new Thread(task, "engine"));
    this.engine = new Engine(new Run(setup), name, journal, instrument, time, this);
    this.recorded.addAll(journal.read());
    this.state = engine.state();
  }

  /** Hands an event over. */
  void enqueue(Event event) {
    try {
      thread.execute(() -> engine.take(event));
    } catch (RejectedExecutionException refused) {
      if (thread.isShutdown()) {
        LOGGER.debug("not taken any more: {}", event);
      } else {
        LOGGER.error("the engine hangs: {} events wait", WAITING_MAX);
        onHalt.accept("the engine hangs; end the daemon and start it again");
      }
    }
  }

  @Override
  public CompletableFuture<Optional<String>> ask(Event.Wish wish) {
    long number = lastAsking.incrementAndGet();
    CompletableFuture<Optional<String>> answer = new CompletableFuture<>();
    askings.put(number, answer);
    enqueue(new Event.Asked(number, wish));
    if (thread.isShutdown()) {
      answer.complete(Optional.of("the daemon is closing"));
    } else if (thread.getQueue().remainingCapacity() == 0) {
      answer.complete(Optional.of("the engine hangs; end the daemon and start it again"));
    }
    return answer;
  }

  @Override
  public RunState state() {
    return state;
  }

  @Override
  public RunSetup setup() {
    return setup;
  }

  @Override
  public Instant now() {
    return time.instant();
  }

  @Override
  public List<Recorded> entriesAfter(long number, int most) {
    synchronized (recorded) {
      int from = recorded.size();
      while (from > 0 && recorded.get(from - 1).number() > number) {
        from--;
      }
      return List.copyOf(
          recorded.subList(from, (int) Math.min(recorded.size(), (long) from + most)));
    }
  }

  @Override
  public AutoCloseable onRecorded(Runnable listener) {
    listeners.add(listener);
    return () -> listeners.remove(listener);
  }

  @Override
  public void answered(Command.Answer answer) {
    answered.add(answer);
  }

  @Override
  public void recorded(List<Recorded> entries) {
    synchronized (recorded) {
      recorded.addAll(entries);
    }
  }

  @Override
  public void stepped(RunState now, List<Wake> wakes) {
    state = now;
    answered.forEach(this::tell);
    answered.clear();
    clock.accept(wakes);
    listeners.forEach(Runnable::run);
  }

  /** Only once the state shows what was done: who is answered may look at once. */
  private void tell(Command.Answer answer) {
    CompletableFuture<Optional<String>> asking = askings.remove(answer.number());
    if (asking != null) {
      asking.complete(answer.refusal());
    }
  }

  @Override
  public void halted(String reason) {
    onHalt.accept(reason);
  }

  @Override
  public void arrived(InstrumentEvent event) {
    enqueue(new Event.FromInstrument(event));
  }

  /** Works through what is waiting, then ends the thread. */
  @Override
  public void close() {
    thread.shutdown();
    try {
      if (!thread.awaitTermination(CLOSE_SECONDS_MAX, TimeUnit.SECONDS)) {
        LOGGER.error("the engine did not come to an end in {} s", CLOSE_SECONDS_MAX);
      }
    } catch (InterruptedException interrupted) {
      Thread.currentThread().interrupt();
    }
    askings.values().forEach(asking -> asking.complete(Optional.of("the daemon is closing")));
  }
}
