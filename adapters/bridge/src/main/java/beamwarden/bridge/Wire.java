package beamwarden.bridge;

import beamwarden.timing.Timeline;
import java.io.BufferedOutputStream;
import java.io.IOException;
import java.io.OutputStream;
import java.time.Duration;
import java.util.Optional;
import java.util.concurrent.BlockingQueue;
import java.util.concurrent.CountDownLatch;
import java.util.concurrent.LinkedBlockingQueue;
import java.util.concurrent.RejectedExecutionException;
import java.util.concurrent.TimeUnit;
import java.util.concurrent.atomic.AtomicLong;
import java.util.concurrent.atomic.AtomicReference;

/**
 * The lines of one connection, in both directions.
 *
 * <p>It reads and writes on two threads of its own. {@link #send} never waits; {@link #next} waits
 * for a line or the end. Every end has one reason, the first that was seen.
 */
final class Wire {
  /** The longest message in either direction, its end not counted. */
  static final int LONGEST_MESSAGE_BYTES = 4 * 1024 * 1024;

  /** How much may wait to be sent before the other side counts as one that does not read. */
  static final long MOST_WAITING_BYTES = 16L * 1024 * 1024;

  /**
   * How much is written under one watch: a peer that reads slowly is not one that does not read.
   */
  private static final int BATCH_BYTES = 64 * 1024;

  private static final byte[] LAST = new byte[0];

  private final Peer peer;
  private final Timeline real;
  private final Duration writeWithin;
  private final Inbox inbox = new Inbox();
  private final BlockingQueue<byte[]> outbox = new LinkedBlockingQueue<>();
  private final AtomicLong waitingBytes = new AtomicLong();
  private final AtomicReference<String> ended = new AtomicReference<>();
  private final CountDownLatch gone = new CountDownLatch(1);
  private volatile String lastReason = "";

  Wire(Peer peer, Timeline real, Duration writeWithin) {
    this.peer = peer;
    this.real = real;
    this.writeWithin = writeWithin;
  }

  /** Starts reading and writing. */
  void start() {
    thread("bridge-read", this::readAll).start();
    thread("bridge-write", this::writeAll).start();
  }

  /** The next line; empty once the connection has ended and every line that came was taken. */
  Optional<byte[]> next() throws InterruptedException {
    return inbox.take();
  }

  /** Sends a line, soon; ends the connection when it is too long or too much waits already. */
  void send(byte[] line) {
    if (ended.get() != null) {
      return;
    }
    if (line.length > LONGEST_MESSAGE_BYTES) {
      end("a message of " + line.length + " bytes is longer than " + LONGEST_MESSAGE_BYTES);
    } else if (waitingBytes.addAndGet(line.length) > MOST_WAITING_BYTES) {
      end(peer.name() + " does not read what it is sent");
    } else {
      outbox.add(line);
    }
  }

  /** Ends the connection once all that waits is sent. */
  void finish(String reason) {
    lastReason = reason;
    outbox.add(LAST);
  }

  /** Ends the connection at once. */
  void end(String reason) {
    if (ended.compareAndSet(null, reason)) {
      inbox.end();
      outbox.add(LAST);
      peer.letGo().run();
      gone.countDown();
    }
  }

  /** Waits until the connection has ended, for at most so long; false when it lasts. */
  boolean awaitEnd(Duration atMost) throws InterruptedException {
    return gone.await(atMost.toMillis(), TimeUnit.MILLISECONDS);
  }

  /** Why the connection ended, in one sentence; empty while it lasts. */
  Optional<String> reason() {
    return Optional.ofNullable(ended.get());
  }

  private void readAll() {
    Lines lines = new Lines(peer.from(), LONGEST_MESSAGE_BYTES);
    try {
      Optional<byte[]> line = lines.next();
      while (line.isPresent() && inbox.put(line.get())) {
        line = lines.next();
      }
      end(peer.name() + " ended the connection");
    } catch (IOException e) {
      end("reading from " + peer.name() + " failed: " + Messages.shortened(e.getMessage()));
    } catch (InterruptedException e) {
      Thread.currentThread().interrupt();
      end("reading from " + peer.name() + " was interrupted");
    }
  }

  private void writeAll() {
    OutputStream to = new BufferedOutputStream(peer.to());
    try {
      while (writeWhatWaits(outbox.take(), to)) {
        // On to the next.
      }
      end(lastReason);
    } catch (IOException | RejectedExecutionException e) {
      end("writing to " + peer.name() + " failed: " + Messages.shortened(e.getMessage()));
    } catch (InterruptedException e) {
      Thread.currentThread().interrupt();
      end("writing to " + peer.name() + " was interrupted");
    }
  }

  private boolean writeWhatWaits(byte[] first, OutputStream to) throws IOException {
    if (first == LAST) {
      return false;
    }
    Timeline.Waiting watch = real.after(writeWithin, this::notRead);
    try {
      byte[] line = first;
      int written = 0;
      while (line != null && line != LAST) {
        to.write(line);
        to.write('\n');
        waitingBytes.addAndGet(-line.length);
        written += line.length;
        line = written < BATCH_BYTES ? outbox.poll() : null;
      }
      to.flush();
      return line != LAST;
    } finally {
      watch.cancel();
    }
  }

  private void notRead() {
    end(peer.name() + " has not read for " + writeWithin.toMillis() / 1000.0 + " s");
  }

  private static Thread thread(String name, Runnable work) {
    Thread thread = new Thread(work, name);
    thread.setDaemon(true);
    return thread;
  }
}
