package beamwarden.bridge;

import java.io.IOException;
import java.nio.channels.FileChannel;
import java.nio.channels.OverlappingFileLockException;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.CopyOnWriteArrayList;

/**
 * Sees to it that one adapter at most works in a folder: a lock on its file {@code lock}, which the
 * operating system takes back when the process ends, in whatever way.
 */
final class FolderLock {
  private static final String FILE = "lock";
  private static final int MOST_TRIES = 20;
  private static final long MILLIS_BETWEEN = 50;

  /**
   * Locked files that nothing closes: were a lock given back before the process has ended, its last
   * deeds would meet those of the next host.
   */
  private static final List<FileChannel> KEPT = new CopyOnWriteArrayList<>();

  private FolderLock() {}

  /**
   * Takes the lock until the process ends.
   *
   * @return false when another process has it and keeps it for a second
   */
  static boolean keep(Path folder) throws IOException, InterruptedException {
    // More than one try, since held() takes the lock for a moment, too.
    for (int tries = 0; tries < MOST_TRIES; tries++) {
      Optional<FileChannel> locked = locked(folder);
      if (locked.isPresent()) {
        KEPT.add(locked.get());
        return true;
      }
      Thread.sleep(MILLIS_BETWEEN);
    }
    return false;
  }

  /** Whether a process has the lock. Must not be asked by the process that has it. */
  static boolean held(Path folder) throws IOException {
    Optional<FileChannel> locked = locked(folder);
    if (locked.isPresent()) {
      locked.get().close();
    }
    return locked.isEmpty();
  }

  private static Optional<FileChannel> locked(Path folder) throws IOException {
    FileChannel channel =
        FileChannel.open(folder.resolve(FILE), StandardOpenOption.CREATE, StandardOpenOption.WRITE);
    boolean locked = false;
    try {
      locked = channel.tryLock() != null;
      return locked ? Optional.of(channel) : Optional.empty();
    } catch (OverlappingFileLockException e) {
      return Optional.empty();
    } finally {
      if (!locked) {
        channel.close();
      }
    }
  }
}
