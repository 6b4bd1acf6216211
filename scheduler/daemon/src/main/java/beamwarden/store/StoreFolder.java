package beamwarden.store;

import beamwarden.ledger.JournalException;
import java.io.IOException;
import java.nio.channels.FileChannel;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.sql.SQLException;

/**
 * Where a store lies.
 *
 * @param path the folder
 */
record StoreFolder(Path path) {
  /** The database; SQLite keeps its log in two more files beside it, which belong to it. */
  Path file() {
    return path.resolve("books.sqlite");
  }

  /** Makes the folder when it is missing. */
  void make() {
    try {
      Files.createDirectories(path);
    } catch (IOException e) {
      throw new JournalException("the folder " + path + " cannot be made: name another one", e);
    }
  }

  /** Refuses a folder without a store. */
  void requireStore() {
    if (!Files.exists(file())) {
      throw new JournalException(
          "there is no store in " + path + ": name the folder that the daemon was given");
    }
  }

  /** Puts the names of new files on disk: syncing a file does not sync its folder. */
  void sync() {
    try (FileChannel channel = FileChannel.open(path, StandardOpenOption.READ)) {
      channel.force(true);
    } catch (IOException e) {
      throw new JournalException(
          "the folder " + path + " cannot be synced: keep the store on a local disk", e);
    }
  }

  JournalException cannotBeOpened(SQLException cause) {
    return new JournalException(
        "the store " + path + " cannot be opened (" + cause.getMessage() + "): see to the disk",
        cause);
  }
}
