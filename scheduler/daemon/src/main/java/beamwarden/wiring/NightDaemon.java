package beamwarden.wiring;

import beamwarden.bridge.BridgeInstrument;
import beamwarden.bridge.HostProcess;
import beamwarden.clockwork.Alarm;
import beamwarden.clockwork.ClockListener;
import beamwarden.clockwork.QuartzClock;
import beamwarden.clockwork.WallClock;
import beamwarden.command.Workshop;
import beamwarden.instrument.Instrument;
import beamwarden.plan.PriorityPlanner;
import beamwarden.profile.Profile;
import beamwarden.run.Desk;
import beamwarden.run.Event;
import beamwarden.run.RunSettings;
import beamwarden.run.RunSetup;
import beamwarden.run.Wake;
import beamwarden.shift.ShiftCalendar;
import beamwarden.store.SqliteJournal;
import beamwarden.timing.PacedTime;
import beamwarden.timing.TimeAnchor;
import beamwarden.web.WebServer;
import beamwarden.web.WebSettings;
import java.net.URI;
import java.nio.file.Path;
import java.time.Duration;
import java.time.Instant;
import java.time.InstantSource;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalLong;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.atomic.AtomicReference;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/**
 * One instrument's daemon, put together: store, line of time, instrument, engine, clock.
 *
 * <p>Starts in this order: lock the store, read and verify the books, open the line of time, take
 * the fence, open the port; the engine's first step then starts or finds the instrument's process.
 * Stops in the reverse order; the instrument is blanked and let go, so that nothing new begins.
 */
public final class NightDaemon implements Workshop.Serving {
  private static final Logger LOGGER = LoggerFactory.getLogger(NightDaemon.class);

  private final SqliteJournal journal;
  private final PacedTime line;
  private final Instrument instrument;
  private final EngineThread engine;
  private final QuartzClock clock;
  private final WebServer web;
  private final ServeFolder folder;
  private final URI address;
  private final CompletableFuture<String> halted = new CompletableFuture<>();

  /**
   * What a daemon is started with.
   *
   * @param profile the instrument profile
   * @param profileHash the hash of its document
   * @param store the store's folder
   * @param pace how many times faster than real time, if a new store is to be paced
   * @param from when a new store's line of time begins, if not now
   * @param seed the seed of a simulated instrument, if not its own
   * @param port the port on loopback; 0 for any that is free
   */
  public record Start(
      Profile profile,
      String profileHash,
      Path store,
      OptionalDouble pace,
      Optional<Instant> from,
      OptionalLong seed,
      int port) {}

  /** Starts a daemon. */
  public static NightDaemon start(Start start) {
    ServeFolder folder = new ServeFolder(start.store());
    folder.make();
    SqliteJournal journal = SqliteJournal.open(start.store());
    try {
      TimeAnchor anchor = LineOfTime.of(folder, start.pace(), start.from());
      return new NightDaemon(start, folder, journal, anchor);
    } catch (RuntimeException failure) {
      journal.close();
      throw failure;
    }
  }

  private NightDaemon(Start start, ServeFolder folder, SqliteJournal journal, TimeAnchor anchor) {
    this.journal = journal;
    this.folder = folder;
    this.line = new PacedTime(anchor, "line-of-time");
    this.instrument = instrument(start, folder, anchor);
    AtomicReference<QuartzClock> armed = new AtomicReference<>();
    this.engine =
        new EngineThread(
            setup(start.profile(), anchor.pace(), journal.store()),
            start.profile().abilities().instrument(),
            journal,
            instrument,
            line,
            wakes -> arm(armed.get(), wakes),
            this::halted);
    this.clock =
        new QuartzClock(
            line, anchor, new WallClock(InstantSource.system(), line::wallStep), new Waking());
    armed.set(clock);
    this.web = new WebServer(engine, settings(start, folder));
    this.address = openPort();
    engine.enqueue(new Event.Woken());
    folder.writeAddress(address.toString());
  }

  private static WebSettings settings(Start start, ServeFolder folder) {
    return new WebSettings(
        start.port(), folder.readOrMakeToken(), start.profileHash(), start.store());
  }

  /** Before the first step: a daemon that nobody can reach does not touch the instrument. */
  private URI openPort() {
    try {
      return web.start();
    } catch (RuntimeException failure) {
      clock.close();
      engine.close();
      line.close();
      throw failure;
    }
  }

  private static void arm(QuartzClock clock, List<Wake> wakes) {
    if (clock != null) {
      clock.wakeAt(wakes.stream().map(wake -> new Alarm(wake.reason().name(), wake.at())).toList());
    }
  }

  private static Instrument instrument(Start start, ServeFolder folder, TimeAnchor anchor) {
    Profile profile = start.profile();
    Map<String, String> options = new HashMap<>(profile.options());
    start.seed().ifPresent(seed -> options.put("seed", Long.toString(seed)));
    Path own = folder.adapter(profile.adapter(), profile.abilities().instrument());
    return new BridgeInstrument(
        HostProcess.ofAdapter(profile.adapter(), own, profile.abilities(), options, anchor));
  }

  /** What a run under a profile is set up with. */
  static RunSetup setup(Profile profile, double pace, String store) {
    ShiftCalendar calendar =
        new ShiftCalendar(profile.zone(), profile.shifts(), profile.windDown());
    return new RunSetup(profile, calendar, RunSettings.atPace(pace), new PriorityPlanner(), store);
  }

  /** Where people turn to this run. */
  public Desk desk() {
    return engine;
  }

  private void halted(String reason) {
    LOGGER.error("nothing runs any more until a person has looked: {}", reason);
    halted.complete(reason);
  }

  @Override
  public String awaitHalt() throws InterruptedException {
    try {
      return halted.get();
    } catch (ExecutionException impossible) {
      throw new IllegalStateException(impossible);
    }
  }

  @Override
  public URI address() {
    return address;
  }

  /** Hands what the clock notices over to the engine. */
  private final class Waking implements ClockListener {
    @Override
    public void due(Alarm alarm) {
      engine.enqueue(new Event.Woken());
    }

    @Override
    public void wallStepped(Duration step) {
      engine.enqueue(new Event.Woken());
    }

    @Override
    public void stalled(Alarm alarm, Duration since) {
      LOGGER.error("the engine has not answered to {} for {}", alarm.reason(), since);
    }
  }

  @Override
  public void close() {
    folder.forgetAddress();
    web.close();
    clock.close();
    instrument.close();
    engine.close();
    line.close();
    journal.close();
  }
}
