package beamwarden.store;

import beamwarden.ledger.JournalException;
import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.channels.FileChannel;
import java.nio.channels.FileLock;
import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.util.Set;
import java.util.concurrent.ConcurrentHashMap;

/**
 * The lock on a store's folder that keeps a second daemon out.
 *
 * <p>A lock of the operating system on the file {@code lock}, which ends with the process however
 * that ends; the file also holds the number of the process, for people. The lock alone would not
 * keep out a second opening in the same process, and on POSIX closing any channel to the file would
 * even end the first one's lock: therefore the folders held here are remembered beside it.
 */
final class StoreLock implements AutoCloseable {
  private static final String FILE = "lock";
  private static final int LONGEST_OWNER_BYTES = 32;
  private static final Set<Path> HELD_HERE = ConcurrentHashMap.newKeySet();

  private final Path folder;
  private final FileChannel channel;

  private StoreLock(Path folder, FileChannel channel) {
    this.folder = folder;
    this.channel = channel;
  }

  /**
   * Takes the lock, or refuses at once.
   *
   * @param folder the store's folder, which exists
   * @throws JournalException when another daemon, or this one, has the store open
   */
  static StoreLock take(Path folder) {
    try {
      Path real = folder.toRealPath();
      if (!HELD_HERE.add(real)) {
        throw inUse(folder, Long.toString(ProcessHandle.current().pid()));
      }
      return takeAcrossProcesses(folder, real);
    } catch (IOException e) {
      throw new JournalException(
          "the store " + folder + " cannot be locked: see that its folder can be written to", e);
    }
  }

  private static StoreLock takeAcrossProcesses(Path folder, Path real) throws IOException {
    StoreLock lock = null;
    FileChannel channel = null;
    try {
      channel =
          FileChannel.open(
              real.resolve(FILE),
              StandardOpenOption.CREATE,
              StandardOpenOption.READ,
              StandardOpenOption.WRITE);
      FileLock held = channel.tryLock();
      if (held == null) {
        throw inUse(folder, owner(channel));
      }
      nameOwner(channel);
      lock = new StoreLock(real, channel);
      return lock;
    } finally {
      if (lock == null) {
        HELD_HERE.remove(real);
        if (channel != null) {
          channel.close();
        }
      }
    }
  }

  private static JournalException inUse(Path folder, String process) {
    return new JournalException(
        "the store "
            + folder
            + " is open in process "
            + process
            + ": stop that daemon first, or name another folder");
  }

  private static String owner(FileChannel channel) throws IOException {
    ByteBuffer bytes = ByteBuffer.allocate(LONGEST_OWNER_BYTES);
    channel.read(bytes, 0);
    return StandardCharsets.UTF_8.decode(bytes.flip()).toString().strip();
  }

  private static void nameOwner(FileChannel channel) throws IOException {
    channel.truncate(0);
    String pid = ProcessHandle.current().pid() + "\n";
    channel.write(ByteBuffer.wrap(pid.getBytes(StandardCharsets.UTF_8)), 0);
  }

  /** Gives the folder free. */
  @Override
  public void close() {
    try {
      channel.close();
    } catch (IOException e) {
      throw new JournalException("the lock on the store " + folder + " could not be given back", e);
    } finally {
      HELD_HERE.remove(folder);
    }
  }
}
