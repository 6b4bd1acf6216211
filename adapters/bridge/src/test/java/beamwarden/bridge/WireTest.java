package beamwarden.bridge;

import static java.nio.charset.StandardCharsets.UTF_8;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import beamwarden.timing.PacedTime;
import beamwarden.timing.TimeAnchor;
import java.io.ByteArrayInputStream;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.InputStream;
import java.io.OutputStream;
import java.time.Duration;
import java.util.Optional;
import java.util.concurrent.CountDownLatch;
import java.util.concurrent.TimeUnit;
import java.util.concurrent.atomic.AtomicInteger;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.Timeout;

@Timeout(20)
class WireTest {
  private static final Duration PATIENCE = Duration.ofMillis(100);

  private final PacedTime real = new PacedTime(TimeAnchor.real(), "watch");
  private final CountDownLatch never = new CountDownLatch(1);
  private final AtomicInteger letGo = new AtomicInteger();

  @AfterEach
  void close() {
    never.countDown();
    real.close();
  }

  private Wire wire(InputStream from, OutputStream to) {
    Wire wire =
        new Wire(
            new Peer("the peer", from, to, Optional.empty(), letGo::incrementAndGet),
            real,
            PATIENCE);
    wire.start();
    return wire;
  }

  private final InputStream silent =
      new InputStream() {
        @Override
        public int read() throws IOException {
          return held();
        }

        @Override
        public int read(byte[] into, int offset, int length) throws IOException {
          return held();
        }
      };

  private final OutputStream deaf =
      new OutputStream() {
        @Override
        public void write(int one) throws IOException {
          held();
        }
      };

  private int held() throws IOException {
    try {
      never.await();
      return -1;
    } catch (InterruptedException e) {
      throw new IOException(e);
    }
  }

  @Test
  void handsOverTheLinesThatCameBeforeTheEnd() throws Exception {
    Wire wire = wire(new ByteArrayInputStream("a\nb\n\nµ\n".getBytes(UTF_8)), deaf);
    assertEquals("a", new String(wire.next().orElseThrow(), UTF_8));
    assertEquals("b", new String(wire.next().orElseThrow(), UTF_8));
    assertEquals("", new String(wire.next().orElseThrow(), UTF_8));
    assertEquals("µ", new String(wire.next().orElseThrow(), UTF_8));
    assertTrue(wire.next().isEmpty());
    assertEquals(Optional.of("the peer ended the connection"), wire.reason());
    assertTrue(wire.awaitEnd(PATIENCE));
    assertEquals(1, letGo.get());
  }

  @Test
  void endsThoughTheStreamItselfCannotBeWoken() throws Exception {
    Wire wire = wire(silent, new ByteArrayOutputStream());
    wire.end("enough");
    assertTrue(wire.next().isEmpty());
    assertTrue(wire.awaitEnd(PATIENCE));
  }

  @Test
  void keepsTheFirstReason() throws Exception {
    Wire wire = wire(silent, new ByteArrayOutputStream());
    wire.end("first");
    wire.end("second");
    assertEquals(Optional.of("first"), wire.reason());
    assertEquals(1, letGo.get());
  }

  @Test
  void givesUpAPeerThatDoesNotRead() throws Exception {
    Wire wire = wire(silent, deaf);
    wire.send("hello".getBytes(UTF_8));
    assertTrue(wire.next().isEmpty());
    assertEquals(Optional.of("the peer has not read for 0.1 s"), wire.reason());
  }

  @Test
  void givesUpAPeerForWhichTooMuchWaits() throws Exception {
    PacedTime still =
        new PacedTime(
            new TimeAnchor(TimeAnchor.real().onLine(), TimeAnchor.real().onWall(), 1e-6), "still");
    Wire wire =
        new Wire(
            new Peer("the peer", silent, deaf, Optional.empty(), letGo::incrementAndGet),
            still,
            PATIENCE);
    wire.start();
    byte[] line = new byte[Wire.LONGEST_MESSAGE_BYTES];
    for (long sent = 0; sent <= Wire.MOST_WAITING_BYTES + line.length; sent += line.length) {
      wire.send(line);
    }
    assertEquals(Optional.of("the peer does not read what it is sent"), wire.reason());
    still.close();
  }

  @Test
  void refusesToSendWhatIsTooLong() {
    Wire wire = wire(silent, new ByteArrayOutputStream());
    wire.send(new byte[Wire.LONGEST_MESSAGE_BYTES + 1]);
    assertEquals(Optional.of("a message of 4194305 bytes is longer than 4194304"), wire.reason());
  }

  @Test
  void takesTheLongestLineAndNoLonger() throws Exception {
    byte[] fits = new byte[Wire.LONGEST_MESSAGE_BYTES + 1];
    fits[fits.length - 1] = '\n';
    assertEquals(
        Wire.LONGEST_MESSAGE_BYTES,
        wire(new ByteArrayInputStream(fits), deaf).next().orElseThrow().length);
    Wire wire = wire(new ByteArrayInputStream(new byte[fits.length]), deaf);
    assertTrue(wire.next().isEmpty());
    assertEquals(
        Optional.of("reading from the peer failed: a message is longer than 4194304 bytes"),
        wire.reason());
  }

  @Test
  void sendsAllThatWaitsBeforeItFinishes() throws Exception {
    ByteArrayOutputStream sent = new ByteArrayOutputStream();
    Wire wire = wire(silent, sent);
    wire.send("a".getBytes(UTF_8));
    wire.send("b".getBytes(UTF_8));
    wire.finish("done");
    assertTrue(wire.awaitEnd(Duration.ofSeconds(5)));
    assertEquals("a\nb\n", sent.toString(UTF_8));
    assertEquals(Optional.of("done"), wire.reason());
  }

  @Test
  void makesAReaderWaitForWhoeverTakesTheLines() throws Exception {
    CountDownLatch asked = new CountDownLatch(1_000_000);
    InputStream endless =
        new InputStream() {
          @Override
          public int read() {
            return '\n';
          }

          @Override
          public int read(byte[] into, int offset, int length) {
            asked.countDown();
            into[offset] = '\n';
            return 1;
          }
        };
    Wire wire = wire(endless, new ByteArrayOutputStream());
    assertTrue(wire.next().isPresent());
    assertFalse(asked.await(50, TimeUnit.MILLISECONDS));
    wire.end("enough");
  }
}
