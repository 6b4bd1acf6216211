package beamwarden.bridge;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.instrument.InstrumentEvent;
import beamwarden.instrument.StopWhen;
import java.io.IOException;
import java.net.ServerSocket;
import java.time.Duration;
import java.util.Optional;
import java.util.Set;
import java.util.concurrent.CountDownLatch;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.Timeout;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** The daemon's side, against a peer that speaks raw lines. */
@Timeout(20)
class BridgeInstrumentTest {
  private static final Limits SHORT =
      new Limits(
          Duration.ofSeconds(5),
          Duration.ofMillis(300),
          Duration.ofMillis(300),
          Duration.ofMillis(500));
  private static final String BEGUN =
      "{\"jsonrpc\":\"2.0\",\"method\":\"event\",\"params\":{\"event\":\"begun\",\"grant\":17}}";

  private final Events events = new Events();
  private ServerSocket port;
  private BridgeInstrument instrument;

  @BeforeEach
  void open() throws IOException {
    port = ScriptedPeer.port();
    instrument =
        new BridgeInstrument(
            new FixedAddress("127.0.0.1", port.getLocalPort(), Optional.of("open")), SHORT);
  }

  @AfterEach
  void close() throws IOException {
    instrument.close();
    port.close();
  }

  private ScriptedPeer greeted() throws IOException {
    instrument.connect(events);
    ScriptedPeer peer = ScriptedPeer.accept(port);
    peer.greets();
    return peer;
  }

  /** What {@code ops/bridge-messages.md} promises to whoever writes an adapter from it alone. */
  @Test
  void speaksANightInLinesThatAnyLanguageCanRead() throws Exception {
    try (ScriptedPeer peer = greeted()) {
      peer.says(
          "{\"jsonrpc\":\"2.0\",\"method\":\"event\",\"params\":{\"event\":\"connected\","
              + ConnectedLine.ABILITIES
              + ",\"session\":\"chamber-41\",\"readings\":{\"beamBlanked\":true,"
              + "\"valveClosed\":true,\"highVoltageOn\":false,"
              + "\"stage\":{\"xMetres\":0,\"yMetres\":0}}}}");
      assertEquals("chamber-41", events.next(InstrumentEvent.Connected.class).session());

      instrument.seal(4, "5f0c1d2e", Set.of(16L), false);
      peer.hears(
          "{\"jsonrpc\":\"2.0\",\"id\":3,\"method\":\"seal\",\"params\":"
              + "{\"fence\":4,\"store\":\"5f0c1d2e\",\"grants\":[16],\"handOver\":false}}");
      peer.accepts(3);
      peer.says(
          "{\"jsonrpc\":\"2.0\",\"method\":\"event\",\"params\":{\"event\":\"sealed\",\"report\":"
              + "{\"fence\":4,\"store\":\"5f0c1d2e\",\"lastBegun\":16,"
              + "\"fates\":{\"16\":{\"fate\":\"unknown\"}}}}}");
      events.next(InstrumentEvent.Sealed.class);

      instrument.heartbeat(1);
      peer.hears(
          "{\"jsonrpc\":\"2.0\",\"id\":4,\"method\":\"heartbeat\",\"params\":{\"number\":1}}");
      peer.says(
          "{\"jsonrpc\":\"2.0\",\"method\":\"event\",\"params\":"
              + "{\"event\":\"heartbeat-seen\",\"number\":1}}");
      peer.accepts(4);
      assertEquals(new InstrumentEvent.HeartbeatSeen(1), events.next());

      instrument.stop(StopWhen.NOW);
      peer.hears(
          "{\"jsonrpc\":\"2.0\",\"id\":5,\"method\":\"stop\",\"params\":{\"when\":\"now\"}}");
      peer.accepts(5);
      instrument.windDown();
      peer.hears("{\"jsonrpc\":\"2.0\",\"id\":6,\"method\":\"wind-down\"}");
      peer.accepts(6);

      Thread closing = new Thread(instrument::close);
      closing.start();
      peer.hears("{\"jsonrpc\":\"2.0\",\"id\":7,\"method\":\"bye\"}");
      peer.accepts(7);
      peer.leaves();
      closing.join();
    }
    events.nothingMore();
  }

  @Test
  void countsAPeerThatDiesBetweenMessagesAsLost() throws Exception {
    try (ScriptedPeer peer = greeted()) {
      peer.says(BEGUN);
    }
    assertEquals(new InstrumentEvent.Begun(17), events.next());
    assertTrue(events.lost().endsWith("ended the connection"));
    events.nothingMore();
  }

  @Test
  void countsAPeerThatDiesInTheMiddleOfAMessageAsLost() throws Exception {
    try (ScriptedPeer peer = greeted()) {
      peer.says(BEGUN);
      peer.writes(BEGUN.substring(0, 40));
    }
    assertEquals(new InstrumentEvent.Begun(17), events.next());
    assertTrue(events.lost().endsWith("the connection ended in the middle of a message"));
    events.nothingMore();
  }

  @Test
  void putsALineTogetherThatComesInPieces() throws Exception {
    try (ScriptedPeer peer = greeted()) {
      peer.writes(BEGUN.substring(0, 40));
      peer.writes(BEGUN.substring(40));
      peer.writes("\r\n" + BEGUN + "\n");
      assertEquals(new InstrumentEvent.Begun(17), events.next());
      assertEquals(new InstrumentEvent.Begun(17), events.next());
    }
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        "",
        "hello",
        "{\"jsonrpc\":\"2.0\",\"method\":\"event\",\"params\":{\"event\":\"exploded\"}}",
        "{\"jsonrpc\":\"2.0\",\"method\":\"progress\",\"params\":{}}",
        "{\"jsonrpc\":\"2.0\",\"id\":99,\"result\":{\"accepted\":true}}",
        "{\"jsonrpc\":\"2.0\",\"id\":2,\"result\":{\"accepted\":true}}",
        "{\"jsonrpc\":\"2.0\",\"id\":1,\"method\":\"connect\"}"
      })
  void endsAConnectionOverALineThatIsNoMessage(String line) throws Exception {
    try (ScriptedPeer peer = greeted()) {
      peer.says(BEGUN);
      peer.says(line);
      peer.says(BEGUN);
      assertEquals(new InstrumentEvent.Begun(17), events.next());
      String reason = events.lost();
      assertTrue(reason.startsWith("the adapter sent what is no message: "), reason);
      assertEquals(Optional.empty(), peer.hears());
    }
    events.nothingMore();
  }

  @Test
  void endsAConnectionOverALineThatIsTooLong() throws Exception {
    try (ScriptedPeer peer = greeted()) {
      String piece = "x".repeat(1 << 20);
      assertThrows(
          IOException.class,
          () -> {
            for (int i = 0; i < 100; i++) {
              peer.writes(piece);
            }
          });
      String reason = events.lost();
      assertTrue(reason.endsWith("a message is longer than 4194304 bytes"), reason);
    }
    events.nothingMore();
  }

  @Test
  void refusesAnEventBeforeHello() throws Exception {
    instrument.connect(events);
    try (ScriptedPeer peer = ScriptedPeer.accept(port)) {
      peer.says(BEGUN);
      assertTrue(events.lost().startsWith("the adapter sent what is no message: "));
    }
    events.nothingMore();
  }

  @Test
  void refusesAnotherProtocol() throws Exception {
    instrument.connect(events);
    try (ScriptedPeer peer = ScriptedPeer.accept(port)) {
      peer.says("{\"jsonrpc\":\"2.0\",\"id\":1,\"result\":{\"accepted\":true,\"protocol\":2}}");
      String reason = events.lost();
      assertTrue(reason.contains("it speaks protocol 2, the daemon speaks 1"), reason);
    }
  }

  @Test
  void countsAPeerThatDoesNotAnswerARequestAsLost() throws Exception {
    try (ScriptedPeer peer = greeted()) {
      instrument.heartbeat(1);
      assertEquals("the adapter has not answered heartbeat within 0.3 s", events.lost());
      assertTrue(peer.hears().isPresent());
    }
    events.nothingMore();
  }

  @Test
  void waitsForTheOutcomeOfAnAcceptedRequestWithoutLimit() throws Exception {
    try (ScriptedPeer peer = greeted()) {
      instrument.prepare(1, Examples.VIOLET, Examples.STAGE);
      assertTrue(peer.hears().isPresent());
      peer.accepts(3);
      Thread.sleep(SHORT.answer().multipliedBy(2).toMillis());
      events.nothingMore();
      peer.says(BEGUN);
      assertEquals(new InstrumentEvent.Begun(17), events.next());
    }
  }

  @Test
  void saysWhyAnAdapterRefusesARequest() throws Exception {
    try (ScriptedPeer peer = greeted()) {
      instrument.measure(1);
      assertTrue(peer.hears().isPresent());
      peer.says(
          "{\"jsonrpc\":\"2.0\",\"id\":3,\"error\":{\"code\":-32603,\"message\":\"no meter\"}}");
      assertEquals("the adapter refused measure: no meter", events.lost());
    }
    events.nothingMore();
  }

  @Test
  void passesOnThatTheAdapterHasLostItsInstrument() throws Exception {
    try (ScriptedPeer peer = greeted()) {
      peer.says(
          "{\"jsonrpc\":\"2.0\",\"method\":\"event\",\"params\":"
              + "{\"event\":\"lost\",\"reason\":\"the column is off\"}}");
      assertEquals("the column is off", events.lost());
      assertEquals(Optional.empty(), peer.hears());
    }
    events.nothingMore();
  }

  @Test
  void connectsAgainAfterTheEnd() throws Exception {
    greeted().close();
    events.lost();
    try (ScriptedPeer peer = greeted()) {
      peer.says(BEGUN);
      assertEquals(new InstrumentEvent.Begun(17), events.next());
    }
    events.lost();
    events.nothingMore();
  }

  @Test
  void letsTheListenerConnectAgainWhenItHearsOfTheEnd() throws Exception {
    CountDownLatch again = new CountDownLatch(1);
    instrument.connect(
        event -> {
          if (event instanceof InstrumentEvent.Lost) {
            instrument.connect(events);
            again.countDown();
          }
        });
    ScriptedPeer.accept(port).close();
    again.await();
    try (ScriptedPeer peer = ScriptedPeer.accept(port)) {
      peer.greets();
      peer.says(BEGUN);
      assertEquals(new InstrumentEvent.Begun(17), events.next());
    }
  }

  @Test
  void givesUpAConnectionWhoseListenerFails() throws Exception {
    instrument.connect(
        event -> {
          events.on(event);
          if (!(event instanceof InstrumentEvent.Lost)) {
            throw new IllegalStateException("no place for it");
          }
        });
    try (ScriptedPeer peer = ScriptedPeer.accept(port)) {
      peer.greets();
      peer.says(BEGUN);
      peer.says(BEGUN);
      assertEquals(new InstrumentEvent.Begun(17), events.next());
      assertEquals("the daemon failed to take an event", events.lost());
    }
    events.nothingMore();
  }

  @Test
  void answersConnectWithLostWhenNobodyIsThere() throws Exception {
    port.close();
    instrument.connect(events);
    String reason = events.lost();
    assertTrue(reason.startsWith("no adapter answers at 127.0.0.1:"), reason);
    events.nothingMore();
  }

  @Test
  void speaksToThisMachineOnly() throws Exception {
    try (BridgeInstrument far =
        new BridgeInstrument(new FixedAddress("192.0.2.1", 7, Optional.empty()))) {
      far.connect(events);
      assertEquals(
          "192.0.2.1 is not this machine; an adapter is spoken to on a loopback address only",
          events.lost());
    }
  }

  @Test
  void asksAfreshOnTheSameConnectionWhenItIsConnected() throws Exception {
    Events later = new Events();
    try (ScriptedPeer peer = greeted()) {
      instrument.connect(later);
      peer.hears("{\"jsonrpc\":\"2.0\",\"id\":3,\"method\":\"connect\"}");
      peer.accepts(3);
      peer.says(BEGUN);
      assertEquals(new InstrumentEvent.Begun(17), later.next());
      peer.leaves();
    }
    assertTrue(later.lost().endsWith("ended the connection"));
    events.nothingMore();
  }

  @Test
  void connectsOnceWhenItIsAskedTwiceBeforeItHasGreeted() throws Exception {
    instrument.connect(events);
    instrument.connect(events);
    try (ScriptedPeer peer = ScriptedPeer.accept(port)) {
      peer.greets();
      peer.says(BEGUN);
      assertEquals(new InstrumentEvent.Begun(17), events.next());
    }
  }

  @Test
  void doesNothingWithoutAConnection() {
    instrument.heartbeat(1);
    instrument.close();
    instrument.heartbeat(2);
    assertThrows(IllegalStateException.class, () -> instrument.connect(events));
    events.nothingMore();
  }

  @Test
  void letsTheListenerCloseIt() throws Exception {
    instrument.connect(
        event -> {
          events.on(event);
          instrument.close();
        });
    try (ScriptedPeer peer = ScriptedPeer.accept(port)) {
      peer.greets();
      peer.says(BEGUN);
      peer.hears("{\"jsonrpc\":\"2.0\",\"id\":3,\"method\":\"bye\"}");
      peer.says(BEGUN);
      peer.accepts(3);
    }
    assertEquals(new InstrumentEvent.Begun(17), events.next());
    events.nothingMore();
  }

  @Test
  void closesAtOnceWhenTheAdapterHasNotGreeted() throws Exception {
    instrument.connect(events);
    try (ScriptedPeer peer = ScriptedPeer.accept(port)) {
      assertTrue(peer.hears().orElseThrow().contains("hello"));
      instrument.close();
      assertEquals(Optional.empty(), peer.hears());
    }
    events.nothingMore();
  }

  @Test
  void endsWithoutTheAdaptersConsentWhenItDoesNotAnswerBye() throws Exception {
    try (ScriptedPeer peer = greeted()) {
      instrument.close();
      assertTrue(peer.hears().orElseThrow().contains("\"bye\""));
      assertEquals(Optional.empty(), peer.hears());
    }
    events.nothingMore();
  }
}
