package beamwarden.bridge;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.beam.Exposure;
import beamwarden.instrument.FaultKind;
import beamwarden.instrument.Grant;
import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.StopWhen;
import beamwarden.timing.PacedTime;
import beamwarden.timing.TimeAnchor;
import java.io.IOException;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.Timeout;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** The adapter's side over real sockets, mostly together with the daemon's. */
@Timeout(20)
class HostTest {
  private static final Limits LIMITS =
      new Limits(
          Duration.ofSeconds(5),
          Duration.ofSeconds(1),
          Duration.ofMillis(500),
          Duration.ofSeconds(5));

  private final FakeInstrument instrument = new FakeInstrument();
  private final PacedTime time = new PacedTime(TimeAnchor.real(), "adapter");
  private final PacedTime real = new PacedTime(TimeAnchor.real(), "watch");
  private final Events events = new Events();
  private HostPort port;
  private Host host;

  @BeforeEach
  void open() throws IOException {
    port = HostPort.open();
    host = host(Duration.ofMinutes(1), LIMITS);
    port.serve(host);
  }

  private Host host(Duration idle, Limits limits) {
    return new Host(
        instrument, time, real, new Host.Settings(Optional.of(port.token()), idle, limits));
  }

  @AfterEach
  void close() throws IOException {
    port.close();
    host.close();
    time.close();
    real.close();
  }

  private BridgeInstrument daemon() {
    return daemon(port.token());
  }

  private BridgeInstrument daemon(String token) {
    return new BridgeInstrument(
        new FixedAddress("127.0.0.1", port.address().port(), Optional.of(token)), LIMITS);
  }

  private BridgeInstrument connected(Events listener) throws InterruptedException {
    BridgeInstrument daemon = daemon();
    daemon.connect(listener);
    listener.next(InstrumentEvent.Connected.class);
    return daemon;
  }

  private static void closed(BridgeInstrument daemon) {
    daemon.close();
  }

  private ScriptedPeer raw() throws IOException {
    return ScriptedPeer.connect(port.address().port());
  }

  private String hello(String token) {
    return "{\"jsonrpc\":\"2.0\",\"id\":1,\"method\":\"hello\",\"params\":{\"protocol\":1,\"token\":\""
        + token
        + "\"}}";
  }

  @Test
  void carriesEveryVerbAndEveryEventInOrder() throws Exception {
    try (BridgeInstrument daemon = daemon()) {
      daemon.connect(events);
      assertEquals(
          new InstrumentEvent.Connected(Examples.ABILITIES, Examples.SESSION, Examples.IDLE),
          events.next());
      daemon.seal(4, "5f0c1d2e", Set.of(16L, 17L), true);
      daemon.prepare(1, Examples.VIOLET, Examples.STAGE);
      daemon.measure(2);
      daemon.heartbeat(912);
      daemon.begin(Examples.GRANT);
      daemon.stop(StopWhen.AT_BOUNDARY);
      daemon.acknowledge(17);
      daemon.windDown();
      events.next(InstrumentEvent.Sealed.class);
      assertEquals(new InstrumentEvent.Prepared(1, Examples.VIOLET, Examples.STAGE), events.next());
      assertEquals(new InstrumentEvent.Measured(2, Examples.READING), events.next());
      assertEquals(new InstrumentEvent.HeartbeatSeen(912), events.next());
      assertEquals(new InstrumentEvent.Begun(17), events.next());
      assertEquals(new InstrumentEvent.Ended(Examples.CUT_SHORT), events.next());
      assertEquals(new InstrumentEvent.WoundDown(Examples.IDLE), events.next());
      for (InstrumentEvent event : Examples.events().values()) {
        if (!(event instanceof InstrumentEvent.Lost)) {
          instrument.tell(event);
          assertEquals(event, events.next());
        }
      }
    }
    assertEquals(
        List.of(
            "connect",
            Call.Seal.of(4, "5f0c1d2e", Set.of(16L, 17L), true),
            new Call.Prepare(1, Examples.VIOLET, Examples.STAGE),
            new Call.Measure(2),
            new Call.Heartbeat(912),
            new Call.Begin(Examples.GRANT),
            new Call.Stop(StopWhen.AT_BOUNDARY),
            new Call.Acknowledge(17),
            new Call.WindDown(),
            "close"),
        instrument.asked());
    events.nothingMore();
  }

  @Test
  void keepsTheOrderOfManyEvents() throws Exception {
    try (BridgeInstrument daemon = connected(events)) {
      for (int done = 0; done < 5000; done++) {
        instrument.tell(new InstrumentEvent.Progress(17, done));
      }
      for (int done = 0; done < 5000; done++) {
        assertEquals(new InstrumentEvent.Progress(17, done), events.next());
      }
      daemon.heartbeat(1);
      assertEquals(new InstrumentEvent.HeartbeatSeen(1), events.next());
    }
  }

  @Test
  void keepsTheInstrumentWhenItsDaemonIsGone() throws Exception {
    try (ScriptedPeer killed = raw()) {
      killed.says(hello(port.token()));
      assertTrue(killed.hears().orElseThrow().contains("\"protocol\":1"));
      killed.says("{\"jsonrpc\":\"2.0\",\"id\":2,\"method\":\"connect\"}");
      assertTrue(killed.hears().isPresent());
      killed.writes("{\"jsonrpc\":\"2.0\",\"id\":3,\"meth");
    }
    instrument.tell(new InstrumentEvent.Progress(17, 1));
    try (BridgeInstrument daemon = connected(events)) {
      assertFalse(instrument.closed());
      daemon.measure(1);
      assertEquals(new InstrumentEvent.Measured(1, Examples.READING), events.next());
      assertEquals(List.of("connect", "connect", new Call.Measure(1)), instrument.asked());
    }
    events.nothingMore();
  }

  @Test
  void givesTheInstrumentToTheNewestDaemon() throws Exception {
    Events older = new Events();
    try (BridgeInstrument first = connected(older);
        BridgeInstrument second = connected(events)) {
      assertEquals(
          "the adapter ended the connection: another daemon has connected to the instrument",
          older.lost());
      first.measure(1);
      second.measure(2);
      assertEquals(new InstrumentEvent.Measured(2, Examples.READING), events.next());
      closed(first);
      second.measure(3);
      assertEquals(new InstrumentEvent.Measured(3, Examples.READING), events.next());
      assertFalse(instrument.closed());
    }
    older.nothingMore();
    assertEquals(
        List.of("connect", "connect", new Call.Measure(2), new Call.Measure(3), "close"),
        instrument.asked());
  }

  @Test
  void ignoresWhatAReplacedDaemonHasStillSent() throws Exception {
    try (ScriptedPeer first = raw()) {
      first.says(hello(port.token()));
      assertTrue(first.hears().isPresent());
      try (BridgeInstrument second = connected(events)) {
        first.says("{\"jsonrpc\":\"2.0\",\"id\":2,\"method\":\"bye\"}");
        while (first.hears().isPresent()) {
          // Whatever it is told, it must not have closed the instrument.
        }
        second.measure(2);
        assertEquals(new InstrumentEvent.Measured(2, Examples.READING), events.next());
        assertFalse(instrument.closed());
      }
    }
  }

  @Test
  void refusesADaemonWithAWrongToken() throws Exception {
    Events stranger = new Events();
    try (BridgeInstrument daemon = connected(events);
        BridgeInstrument wrong = daemon("0".repeat(64))) {
      wrong.connect(stranger);
      assertEquals("the adapter refused hello: the token is wrong", stranger.lost());
      daemon.measure(1);
      assertEquals(new InstrumentEvent.Measured(1, Examples.READING), events.next());
    }
    stranger.nothingMore();
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        "{\"jsonrpc\":\"2.0\",\"id\":1,\"method\":\"hello\",\"params\":{\"protocol\":1}}",
        "{\"jsonrpc\":\"2.0\",\"id\":1,\"method\":\"wind-down\"}",
        "{\"jsonrpc\":\"2.0\",\"id\":1,\"result\":{\"accepted\":true}}",
        "GET / HTTP/1.1",
        ""
      })
  void saysWhyItRefusesAStranger(String line) throws Exception {
    try (ScriptedPeer stranger = raw()) {
      stranger.says(line);
      assertTrue(stranger.hears().orElseThrow().contains("\"error\":{\"code\":-32"));
      assertEquals(Optional.empty(), stranger.hears());
    }
    assertEquals(List.of(), instrument.asked());
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        "{\"jsonrpc\":\"2.0\",\"id\":2,\"method\":\"expose\"}",
        "{\"jsonrpc\":\"2.0\",\"id\":2,\"method\":\"measure\",\"params\":{}}",
        "{\"jsonrpc\":\"2.0\",\"method\":\"event\",\"params\":{\"event\":\"begun\",\"grant\":1}}",
        "}"
      })
  void saysWhyItEndsAConnectionOverALineThatIsNoRequest(String line) throws Exception {
    try (ScriptedPeer peer = raw()) {
      peer.says(hello(port.token()));
      assertTrue(peer.hears().isPresent());
      peer.says(line);
      peer.says("{\"jsonrpc\":\"2.0\",\"id\":3,\"method\":\"wind-down\"}");
      assertTrue(peer.hears().orElseThrow().contains("\"error\":{\"code\":-32"));
      assertEquals(Optional.empty(), peer.hears());
    }
    assertEquals(List.of(), instrument.asked());
  }

  @Test
  void endsAConnectionOverAHundredMegabytesWithoutAnEnd() throws Exception {
    try (ScriptedPeer stranger = raw()) {
      String piece = "x".repeat(1 << 20);
      assertThrows(
          IOException.class,
          () -> {
            for (int i = 0; i < 100; i++) {
              stranger.writes(piece);
            }
          });
    }
    connected(events).close();
  }

  @Test
  void cutsOffAStrangerThatSaysNothing() throws Exception {
    try (ScriptedPeer silent = raw()) {
      assertEquals(Optional.empty(), silent.hears());
    }
  }

  @Test
  void turnsAwayMoreConnectionsThanItCanHold() throws Exception {
    List<ScriptedPeer> strangers = new ArrayList<>();
    for (int i = 0; i < 17; i++) {
      strangers.add(raw());
    }
    assertEquals(Optional.empty(), strangers.get(16).hears());
    for (ScriptedPeer stranger : strangers) {
      stranger.leaves();
    }
  }

  @Test
  void tellsTheDaemonWhenTheAdapterFails() throws Exception {
    try (BridgeInstrument daemon = connected(events)) {
      Grant g = Examples.GRANT;
      Exposure e = g.exposure();
      daemon.begin(
          new Grant(
              FakeInstrument.FATAL_GRANT,
              g.store(),
              g.fence(),
              g.session(),
              e,
              g.longestBeamOn(),
              g.highestCurrent(),
              g.heartbeat(),
              g.latestStart(),
              g.lease(),
              g.chainHead()));
      assertEquals(
          "the adapter refused begin: the adapter failed: the scan generator is on fire",
          events.lost());
      daemon.connect(events);
      events.next(InstrumentEvent.Connected.class);
      assertFalse(instrument.closed());
    }
  }

  @Test
  void passesOnThatTheInstrumentIsLostAndConnectsAgain() throws Exception {
    try (BridgeInstrument daemon = connected(events)) {
      instrument.tell(new InstrumentEvent.Lost("the column is off"));
      assertEquals("the column is off", events.lost());
      daemon.connect(events);
      events.next(InstrumentEvent.Connected.class);
    }
    events.nothingMore();
  }

  @Test
  void endsWhenADaemonSaysBye() throws Exception {
    connected(events).close();
    assertTrue(instrument.closed());
    host.awaitOver();
  }

  @Test
  void endsWhenNoDaemonComes() throws Exception {
    FakeInstrument alone = new FakeInstrument();
    Host lonely =
        new Host(
            alone, time, real, new Host.Settings(Optional.of("x"), Duration.ofMillis(50), LIMITS));
    lonely.awaitOver();
    assertTrue(alone.closed());
  }

  @Test
  void cutsOffADaemonThatDoesNotRead() throws Exception {
    try (ScriptedPeer deaf = raw()) {
      deaf.says(hello(port.token()));
      assertTrue(deaf.hears().isPresent());
      deaf.says("{\"jsonrpc\":\"2.0\",\"id\":2,\"method\":\"connect\"}");
      assertTrue(deaf.hears().isPresent());
      String reason = "x".repeat(100_000);
      for (int i = 0; i < 400; i++) {
        instrument.tell(new InstrumentEvent.Trouble(Examples.fault(FaultKind.VACUUM, reason)));
      }
      int heard = 0;
      while (deaf.hears().isPresent()) {
        heard++;
      }
      assertTrue(heard < 400, "all was sent, or kept, for one that does not read");
      connected(events).close();
    }
  }
}
