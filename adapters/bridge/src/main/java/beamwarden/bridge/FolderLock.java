package beamwarden.bridge;

import java.io.IOException;
import java.nio.channels.FileChannel;
import java.nio.channels.FileLock;
import java.nio.channels.OverlappingFileLockException;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.util.Optional;

/**
 * Sees to it that one adapter at most works in a folder: a lock on its file {@code lock}, which the
 * operating system takes back when the process ends, in whatever way.
 */
final class FolderLock implements AutoCloseable {
  private static final String FILE = "lock";
  private static final int MOST_TRIES = 20;
  private static final long MILLIS_BETWEEN = 50;

  private final FileChannel channel;

  private FolderLock(FileChannel channel) {
    this.channel = channel;
  }

  /** Takes the lock, or empty when another process has it and keeps it for a second. */
  static Optional<FolderLock> take(Path folder) throws IOException, InterruptedException {
    // More than one try, since held() takes the lock for a moment, too.
    for (int tries = 0; tries < MOST_TRIES; tries++) {
      Optional<FolderLock> lock = takeAtOnce(folder);
      if (lock.isPresent()) {
        return lock;
      }
      Thread.sleep(MILLIS_BETWEEN);
    }
    return Optional.empty();
  }

  /** Whether a process has the lock. Must not be asked by the process that has it. */
  static boolean held(Path folder) throws IOException {
    Optional<FolderLock> lock = takeAtOnce(folder);
    if (lock.isPresent()) {
      lock.get().close();
    }
    return lock.isEmpty();
  }

  private static Optional<FolderLock> takeAtOnce(Path folder) throws IOException {
    FileChannel channel =
        FileChannel.open(folder.resolve(FILE), StandardOpenOption.CREATE, StandardOpenOption.WRITE);
    boolean taken = false;
    try {
      FileLock lock = channel.tryLock();
      taken = lock != null;
      return taken ? Optional.of(new FolderLock(channel)) : Optional.empty();
    } catch (OverlappingFileLockException e) {
      return Optional.empty();
    } finally {
      if (!taken) {
        channel.close();
      }
    }
  }

  @Override
  public void close() throws IOException {
    channel.close();
  }
}
